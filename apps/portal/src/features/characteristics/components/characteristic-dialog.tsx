import { isUndetermined } from '@trammel/metrology/conformance';
import {
  readTolerance,
  statedLimits,
  writeTolerance,
  type StatedTolerance,
} from '@trammel/metrology/tolerance-notation';
import { unitSymbols, type GeometricSpec } from '@trammel/shared/characteristics';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { Checkbox } from '../../../components/ui/choice-fields.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { classWords, kindWords, valueOfWord } from '../characteristic-words.ts';
import { checkRow, type RowDetails, type TableColumn, type TableRow } from '../table-row.ts';
import { GeometricFields } from './geometric-fields.tsx';
import { ToleranceFields } from './tolerance-fields.tsx';

export interface CharacteristicDialogProps {
  row: TableRow;
  onClose: () => void;
  onApply: (cells: Partial<Record<TableColumn, string>>, details: RowDetails) => void;
}

const noGeometric: GeometricSpec = {
  type: 'position',
  diametral: false,
  modifier: 'RFS',
  datums: '',
  feature: 'internal',
  sizeBalloon: null,
};

const besideField = new Set<TableColumn>(['balloon', 'description', 'decimals']);

/** One characteristic with everything a drawing says of it; what is applied here is saved with the table. */
export function CharacteristicDialog({ row, onClose, onApply }: CharacteristicDialogProps) {
  const [cells, setCells] = useState(row.cells);
  const [details, setDetails] = useState(row.details);
  const set = (column: TableColumn) => (text: string) =>
    setCells((before) => ({ ...before, [column]: text }));
  const kind = valueOfWord(kindWords, cells.kind) ?? 'size';
  const geometric = kind === 'geometric';
  const [stated, setStated] = useState<StatedTolerance>(() => {
    const read = readTolerance({ nominal: cells.nominal, tolerance: cells.tolerance, geometric });
    return isUndetermined(read) ? { form: 'symmetric', nominal: cells.nominal, tolerance: '' } : read.stated;
  });
  const limits = statedLimits(stated, cells.unit || '1');
  const next: TableRow = {
    ...row,
    cells: { ...cells, ...writeTolerance(stated, geometric) },
    details: geometric
      ? { ...details, geometric: details.geometric ?? noGeometric }
      : { ...details, geometric: null },
  };
  const { faults } = checkRow(next);
  const errorOf = (column: TableColumn) => faults.find((fault) => fault.column === column)?.message;
  const elsewhere = faults.filter(({ column }) => !besideField.has(column));
  const id = (name: string) => `characteristic-${name}`;

  return (
    <Dialog
      open
      width="wide"
      onClose={onClose}
      title={`Balloon ${row.cells.balloon || 'without a number'}`}
      footer={
        <>
          <Button
            weight="primary"
            disabled={faults.length > 0}
            onClick={() => onApply(next.cells, next.details)}
          >
            Take into the table
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </>
      }
    >
      <div className="grid gap-4 sm:grid-cols-3">
        <TextField
          id={id('balloon')}
          label="Balloon"
          mono
          value={cells.balloon}
          onChange={set('balloon')}
          error={errorOf('balloon')}
        />
        <TextField id={id('sheet')} label="Sheet" mono optional value={cells.sheet} onChange={set('sheet')} />
        <TextField id={id('zone')} label="Zone" mono optional value={cells.zone} onChange={set('zone')} />
        <TextField
          id={id('description')}
          label="Description"
          className="sm:col-span-2"
          value={cells.description}
          onChange={set('description')}
          error={errorOf('description')}
        />
        <SelectField
          id={id('kind')}
          label="Kind"
          value={kind}
          onChange={(value) => set('kind')(kindWords[value])}
          options={(Object.keys(kindWords) as (typeof kind)[]).map((value) => ({
            value,
            label: kindWords[value],
          }))}
        />
      </div>
      <ToleranceFields stated={stated} unit={cells.unit} geometric={geometric} onChange={setStated} />
      <p aria-live="polite" className={isUndetermined(limits) ? 'text-vermilion' : 'figures'}>
        {isUndetermined(limits)
          ? `${limits.reason}.`
          : `${limits.explanation}${limits.lower !== null || limits.upper !== null ? `: ${limits.lower ?? 'no lower limit'} to ${limits.upper ?? 'no upper limit'}` : ''}`}
      </p>
      {geometric && (
        <GeometricFields
          value={details.geometric ?? noGeometric}
          onChange={(value) => setDetails({ ...details, geometric: value })}
        />
      )}
      <div className="grid gap-4 sm:grid-cols-3">
        <SelectField
          id={id('unit')}
          label="Unit"
          value={cells.unit}
          onChange={set('unit')}
          options={unitSymbols.map((value) => ({ value, label: value === '1' ? '1 (none)' : value }))}
        />
        <TextField
          id={id('decimals')}
          label="Decimals on the drawing"
          mono
          inputMode="numeric"
          value={cells.decimals}
          onChange={set('decimals')}
          error={errorOf('decimals')}
          hint="Empty takes those of the limits"
        />
        <SelectField
          id={id('class')}
          label="Class"
          value={valueOfWord(classWords, cells.class || 'none') ?? 'none'}
          onChange={(value) => set('class')(value === 'none' ? '' : classWords[value])}
          options={(Object.keys(classWords) as (keyof typeof classWords)[]).map((value) => ({
            value,
            label: classWords[value],
          }))}
        />
        <TextField
          id={id('method')}
          label="Measuring method"
          optional
          value={cells.method}
          onChange={set('method')}
        />
        <TextField
          id={id('pieces')}
          label="Sample pieces"
          hint="Empty takes the request's number"
          mono
          inputMode="numeric"
          value={details.pieces === null ? '' : String(details.pieces)}
          onChange={(text) =>
            /^\d{0,4}$/.test(text) && setDetails({ ...details, pieces: text === '' ? null : Number(text) })
          }
        />
        {kind === 'basic' && (
          <TextField
            id={id('controlled')}
            label="Controlled by balloons"
            hint="The geometric rows, parted by spaces"
            mono
            value={details.controlledBy.join(' ')}
            onChange={(text) =>
              setDetails({ ...details, controlledBy: text.split(/[,\s]+/).filter((part) => part !== '') })
            }
          />
        )}
      </div>
      <Checkbox
        id={id('attribute')}
        label="A pass or fail result may stand for readings"
        value={details.attributeAllowed ?? (kind === 'attribute' || kind === 'note')}
        onChange={(attributeAllowed) => setDetails({ ...details, attributeAllowed })}
      />
      <TextArea
        id={id('note')}
        label="Note"
        optional
        rows={2}
        value={details.note}
        onChange={(note) => setDetails({ ...details, note })}
      />
      {elsewhere.length > 0 && (
        <ul className="text-vermilion">
          {elsewhere.map((fault) => (
            <li key={fault.column + fault.message}>{fault.message}</li>
          ))}
        </ul>
      )}
    </Dialog>
  );
}
