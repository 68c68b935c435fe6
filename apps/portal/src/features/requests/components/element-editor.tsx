import { elementDemands, type ElementDemand, type RequestElement } from '@trammel/shared/requests';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { demandWords } from '../words.ts';
import type { RequestFieldsProps } from './request-fields.tsx';

const demands = elementDemands.map((value) => ({ value, label: demandWords[value] }));

/** The list a level implies, editable: the demand of each element, and elements of the customer's own. */
export function ElementEditor({ values, set, options, idOf }: RequestFieldsProps) {
  const [typed, setTyped] = useState('');
  const { elements } = values;
  const submitted = elements.filter((element) => element.demand === 'submit').length;
  const change = (code: string, demand: ElementDemand) =>
    set({ elements: elements.map((one) => (one.code === code ? { ...one, demand } : one)) });
  const fromTemplate = (code: string) =>
    options.template[0]?.elements.some((one) => one.code === code) ?? false;
  const label = typed.trim();
  const known = elements.some((one) => one.label.toLowerCase() === label.toLowerCase());
  const add = () => {
    if (label === '' || known) return;
    set({ elements: [...elements, { code: codeFor(label, elements), label, demand: 'submit' }] });
    setTyped('');
  };
  return (
    <details id={idOf('elements')} className="border border-rule bg-sheet">
      <summary className="cursor-pointer px-3 py-2">
        Elements: {submitted} to submit, {elements.filter((one) => one.demand === 'keep-at-supplier').length}{' '}
        kept at the supplier
      </summary>
      <ul className="border-t border-rule">
        {elements.map((element) => (
          <li
            key={element.code}
            className="flex flex-wrap items-center gap-x-4 gap-y-1 border-rule px-3 py-1 not-first:border-t"
          >
            <span className="min-w-0 flex-1 basis-56 break-words">{element.label}</span>
            <SelectField<ElementDemand>
              id={idOf(`elements.${element.code}`)}
              label={`Demand for ${element.label}`}
              labelHidden
              value={element.demand}
              onChange={(demand) => change(element.code, demand)}
              options={demands}
            />
            {!fromTemplate(element.code) && (
              <Button
                size="small"
                aria-label={`Remove ${element.label}`}
                onClick={() => set({ elements: elements.filter((one) => one.code !== element.code) })}
              >
                Remove
              </Button>
            )}
          </li>
        ))}
      </ul>
      <div className="flex flex-wrap items-end gap-3 border-t border-rule px-3 py-2">
        <TextField
          id={idOf('elements.new')}
          label="Another element"
          maxLength={200}
          className="min-w-0 flex-1 basis-56"
          error={known && label !== '' ? 'This element is already listed.' : undefined}
          value={typed}
          onChange={setTyped}
          onKeyDown={(event) => {
            if (event.key !== 'Enter') return;
            event.preventDefault();
            add();
          }}
        />
        <Button onClick={add}>Add element</Button>
      </div>
      <p className="caption border-t border-rule px-3 py-2">Demands by level: {options.templateSource}.</p>
    </details>
  );
}

/** A code of small letters made from the label; letters alone, because the contract knows no others. */
function codeFor(label: string, taken: readonly RequestElement[]): string {
  const letters = label
    .normalize('NFKD')
    .toLowerCase()
    .replace(/[^a-z]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 40);
  let code = `own-${letters}`.replace(/-$/, '');
  while (taken.some((element) => element.code === code)) code += '-x';
  return code;
}
