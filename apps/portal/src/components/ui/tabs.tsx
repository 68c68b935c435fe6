import { useId, useRef, type KeyboardEvent, type ReactNode } from 'react';
import { cn } from '../../lib/cn.ts';
import { useUrlState } from '../../lib/use-url-state.ts';

export interface Tab {
  id: string;
  label: string;
  /** A number beside the label, such as open findings. */
  count?: number;
  content: () => ReactNode;
}

export interface TabsProps {
  /** What the tabs divide, for screen readers. */
  label: string;
  tabs: readonly [Tab, ...Tab[]];
  /** Name in the address. */
  param?: string;
}

/** Parts of one page; the open one stands in the address and each opening is a step of the browser's history. */
export function Tabs({ label, tabs, param = 'tab' }: TabsProps) {
  const base = useId();
  const list = useRef<HTMLDivElement>(null);
  const [state, change] = useUrlState({ [param]: tabs[0].id });
  const open = tabs.find((tab) => tab.id === state[param]) ?? tabs[0];

  const move = (event: KeyboardEvent) => {
    const index = tabs.indexOf(open);
    const steps: Record<string, number> = {
      ArrowRight: index + 1,
      ArrowLeft: index - 1,
      Home: 0,
      End: tabs.length - 1,
    };
    const target = steps[event.key];
    if (target === undefined) return;
    event.preventDefault();
    const position = (target + tabs.length) % tabs.length;
    const next = tabs[position];
    if (next === undefined) return;
    change({ [param]: next.id });
    list.current?.querySelectorAll<HTMLElement>('[role=tab]')[position]?.focus();
  };

  return (
    <div>
      <div
        ref={list}
        role="tablist"
        aria-label={label}
        tabIndex={-1}
        onKeyDown={move}
        className="no-print flex gap-1 overflow-x-auto border-b border-rule"
      >
        {tabs.map((tab) => (
          <button
            key={tab.id}
            type="button"
            role="tab"
            id={`${base}${tab.id}`}
            aria-selected={tab === open}
            aria-controls={`${base}${tab.id}-panel`}
            tabIndex={tab === open ? 0 : -1}
            onClick={() => change({ [param]: tab.id }, { push: true })}
            className={cn(
              '-mb-px min-h-9 border-b-3 px-3 whitespace-nowrap -outline-offset-2 pointer-coarse:min-h-11',
              tab === open
                ? 'border-marking font-semibold text-graphite'
                : 'border-transparent text-pencil hover:text-graphite',
            )}
          >
            {tab.label}
            {tab.count !== undefined && <span className="figures ml-1.5 text-pencil">{tab.count}</span>}
          </button>
        ))}
      </div>
      <div
        role="tabpanel"
        id={`${base}${open.id}-panel`}
        aria-labelledby={`${base}${open.id}`}
        className="pt-4"
      >
        {open.content()}
      </div>
    </div>
  );
}
