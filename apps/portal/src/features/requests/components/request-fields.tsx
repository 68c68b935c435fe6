import type { RequestReason } from '@trammel/shared/requests';
import { requestReasons, streamKinds } from '@trammel/shared/requests';
import type { ReactNode } from 'react';
import { CheckboxGroup } from '../../../components/ui/choice-fields.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';
import type { RequestValues } from '../form-values.ts';
import { levelWords, reasonWords, streamKindWords } from '../words.ts';
import { DecisionRuleFields } from './decision-rule-fields.tsx';
import { ElementEditor } from './element-editor.tsx';
import { PartPicker } from './part-picker.tsx';
import { SupplierPicker } from './supplier-picker.tsx';
import type { RequestOptions } from './use-request-options.ts';

export interface RequestFieldsProps {
  values: RequestValues;
  set: (change: Partial<RequestValues>) => void;
  errorOf: (field: string) => string | undefined;
  idOf: (field: string) => string;
  options: RequestOptions;
}

/** The parts of a request in the order in which a customer thinks of them. */
export function RequestFields(props: RequestFieldsProps) {
  const { values, set, errorOf, idOf, options } = props;
  const chooseLevel = (text: string) => {
    const level = Number(text);
    set({
      level,
      elements: options.template.find((one) => one.level === level)?.elements ?? values.elements,
    });
  };
  return (
    <div className="flex flex-col gap-6">
      <Part title="Part and supplier">
        <PartPicker {...props} />
        <SupplierPicker {...props} />
      </Part>
      <Part title="Reason and level">
        <div className="grid gap-4 md:grid-cols-2">
          <SelectField<RequestReason>
            id={idOf('reason')}
            label="Reason"
            value={values.reason}
            error={errorOf('reason')}
            onChange={(reason) => set({ reason })}
            options={requestReasons.map((value) => ({ value, label: reasonWords[value] }))}
          />
          <TextField
            id={idOf('reasonNote')}
            label="Reason in words"
            optional={values.reason !== 'other'}
            error={errorOf('reasonNote')}
            maxLength={200}
            value={values.reasonNote}
            onChange={(reasonNote) => set({ reasonNote })}
          />
        </div>
        <SelectField
          id={idOf('level')}
          label="Submission level"
          hint="Sets the element list below; choosing another level sets it anew."
          value={String(values.level)}
          error={errorOf('level')}
          onChange={chooseLevel}
          options={[1, 2, 3, 4, 5].map((level) => ({
            value: String(level),
            label: `${level}: ${levelWords[level] ?? ''}`,
          }))}
        />
        <ElementEditor {...props} />
      </Part>
      <Part title="Streams and sample pieces">
        <div className="grid gap-4 md:grid-cols-[200px_minmax(0,1fr)_200px]">
          <SelectField
            id={idOf('streamKind')}
            label="Kind of stream"
            value={values.streamKind}
            error={errorOf('streamKind')}
            onChange={(streamKind) => set({ streamKind })}
            options={streamKinds.map((value) => ({ value, label: streamKindWords[value] }))}
          />
          <TextArea
            id={idOf('streams')}
            label="Names of the streams"
            hint="One a line. Each is judged on its own, never pooled."
            error={errorOf('streams')}
            value={values.streams}
            onChange={(streams) => set({ streams })}
          />
          <TextField
            id={idOf('piecesPerStream')}
            label="Pieces from each"
            inputMode="numeric"
            mono
            error={errorOf('piecesPerStream')}
            value={values.piecesPerStream}
            onChange={(piecesPerStream) => set({ piecesPerStream })}
          />
        </div>
        <DecisionRuleFields {...props} />
      </Part>
      <Part title="Date, reviewers and message">
        <div className="grid gap-4 md:grid-cols-2">
          <DateField
            id={idOf('dueOn')}
            label="Due"
            error={errorOf('dueOn')}
            value={values.dueOn}
            onChange={(dueOn) => set({ dueOn })}
          />
          <TextField
            id={idOf('purchaseOrder')}
            label="Purchase order"
            optional
            mono
            maxLength={200}
            error={errorOf('purchaseOrder')}
            value={values.purchaseOrder}
            onChange={(purchaseOrder) => set({ purchaseOrder })}
          />
        </div>
        <CheckboxGroup
          id={idOf('reviewerIds')}
          label="Reviewers"
          hint="Acknowledgement, questions and submission reach them by mail. One with the authority to sign is needed for the disposition."
          error={errorOf('reviewerIds')}
          value={values.reviewerIds}
          onChange={(reviewerIds) => set({ reviewerIds })}
          options={options.reviewers.map((person) => ({
            value: person.id,
            label: person.name,
            hint: [person.title, person.maySign ? 'may sign' : ''].filter(Boolean).join(', ') || undefined,
          }))}
        />
        <TextArea
          id={idOf('message')}
          label="Message to the supplier"
          optional
          error={errorOf('message')}
          value={values.message}
          onChange={(message) => set({ message })}
        />
      </Part>
    </div>
  );
}

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <fieldset className="flex min-w-0 flex-col gap-4 border-t border-rule pt-3">
      <legend className="pr-3">
        <h2>{title}</h2>
      </legend>
      {children}
    </fieldset>
  );
}
