import { useEffect, useId, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';
import { useNavigate } from 'react-router-dom';
import { cn } from '../../lib/cn.ts';
import { placePopover } from './place-popover.ts';
import { buttonLook, type ButtonSize, type ButtonWeight } from './button-look.ts';

export interface MenuItem {
  label: string;
  /** Either an act or an address of the portal. */
  onSelect?: () => void;
  to?: string;
  danger?: boolean;
  disabled?: boolean;
}

export interface MenuProps {
  label: ReactNode;
  /** Where the visible label is not enough, such as a column of equal buttons. */
  accessibleLabel?: string;
  items: readonly MenuItem[];
  weight?: ButtonWeight;
  size?: ButtonSize;
}

export function Menu({ label, accessibleLabel, items, weight, size }: MenuProps) {
  const [open, setOpen] = useState(false);
  const id = useId();
  const root = useRef<HTMLDivElement>(null);
  const trigger = useRef<HTMLButtonElement>(null);
  const list = useRef<HTMLDivElement>(null);
  const navigate = useNavigate();
  const entries = () => [
    ...(root.current?.querySelectorAll<HTMLElement>('[role=menuitem]:not(:disabled)') ?? []),
  ];

  useEffect(() => {
    const box = list.current;
    if (!open || box === null || trigger.current === null) return;
    // The top layer is not cut off by a scrolling table.
    box.showPopover();
    placePopover(box, trigger.current.getBoundingClientRect(), 'end');
    entries()[0]?.focus({ preventScroll: true });
    const leave = () => setOpen(false);
    const outside = (event: PointerEvent) => {
      if (!root.current?.contains(event.target as Node)) setOpen(false);
    };
    document.addEventListener('pointerdown', outside);
    document.addEventListener('scroll', leave, true);
    return () => {
      document.removeEventListener('pointerdown', outside);
      document.removeEventListener('scroll', leave, true);
    };
  }, [open]);

  const close = () => {
    setOpen(false);
    trigger.current?.focus();
  };

  const hear = (event: KeyboardEvent) => {
    if (!open) {
      if (event.key !== 'ArrowDown') return;
      event.preventDefault();
      setOpen(true);
      return;
    }
    const all = entries();
    const at = all.indexOf(document.activeElement as HTMLElement);
    const steps: Record<string, number> = {
      ArrowDown: at + 1,
      ArrowUp: at - 1,
      Home: 0,
      End: all.length - 1,
    };
    const target = steps[event.key];
    if (target !== undefined) {
      event.preventDefault();
      all[(target + all.length) % all.length]?.focus();
    } else if (event.key === 'Escape') {
      event.preventDefault();
      event.stopPropagation();
      close();
    } else if (event.key === 'Tab') setOpen(false);
  };

  const select = (item: MenuItem) => {
    close();
    item.onSelect?.();
    if (item.to !== undefined) void navigate(item.to);
  };

  return (
    // The keys are those of the menu's own buttons; the wrapper only hears them on their way up.
    <div ref={root} className="relative inline-block" role="presentation" onKeyDown={hear}>
      <button
        ref={trigger}
        type="button"
        aria-haspopup="menu"
        aria-expanded={open}
        aria-controls={open ? id : undefined}
        aria-label={accessibleLabel}
        onClick={() => setOpen(!open)}
        className={buttonLook(weight, size)}
      >
        {label}
        <svg aria-hidden="true" viewBox="0 0 10 6" className="w-2.5 fill-none stroke-current stroke-[1.5]">
          <path d="M1 1l4 4 4-4" />
        </svg>
      </button>
      {open && (
        <div
          ref={list}
          id={id}
          role="menu"
          popover="manual"
          className="fixed inset-auto m-0 min-w-44 flex-col rounded-max border border-pencil bg-sheet py-1 text-graphite open:flex"
        >
          {items.map((item) => (
            <button
              key={item.label}
              type="button"
              role="menuitem"
              tabIndex={-1}
              disabled={item.disabled}
              onClick={() => select(item)}
              className={cn(
                'min-h-8 px-3 text-start whitespace-nowrap -outline-offset-2 hover:bg-marking/10 disabled:text-pencil pointer-coarse:min-h-10',
                item.danger && 'text-vermilion',
              )}
            >
              {item.label}
            </button>
          ))}
        </div>
      )}
    </div>
  );
}
