import { addGauge } from '../features/gauges/gauges.service.ts';
import { fillRows } from '../features/measurements/measurements.service.ts';
import { findElements } from '../features/submissions/elements.queries.ts';
import { attachFile, changeElement } from '../features/submissions/elements.service.ts';
import type { Core } from '../http/core.ts';
import type { DemoCast } from './cast.ts';
import { documentPdf } from './document-pdf.ts';
import { seedFile } from './files.ts';
import { sheetOf, type DemoPart, type SeededPackage, type Seeding } from './steps.ts';

export interface DemoGauge {
  readonly code: string;
  readonly kind: string;
  readonly resolution: string | null;
  readonly unit: 'mm' | 'µm' | 'deg' | 'HRC' | 'N' | 'kN' | 'g' | 'dE' | 'ml/min' | 'HBW' | '1';
  readonly calibrated: number;
  readonly due: number;
  readonly balloons: readonly string[];
}

/** Registers gauges and names them, with the day of measuring, on the rows they measured. */
export async function nameGauges(
  seeding: Seeding,
  pack: SeededPackage,
  gauges: readonly DemoGauge[],
  who: string,
  days: number,
): Promise<void> {
  const { core, cast } = seeding;
  const sheet = await sheetOf(core, cast, pack, who);
  const known = new Map((await existingGauges(core, cast, pack)).map((gauge) => [gauge.code, gauge.id]));
  for (const { calibrated, due, balloons, ...gauge } of gauges) {
    const id =
      known.get(gauge.code) ??
      (
        await addGauge(cast.deed(who, days, 12), {
          ...gauge,
          calibratedOn: cast.date(calibrated),
          dueOn: cast.date(due),
          certificate: '',
        })
      ).id;
    const rows = sheet.characteristics
      .filter((facts) => balloons.includes(facts.balloon))
      .flatMap((facts) =>
        sheet.streams.map((stream) => ({ characteristicId: facts.id, streamId: stream.id })),
      );
    if (rows.length > 0)
      await fillRows(cast.deed(who, days, 14), pack.submissionId, {
        rows,
        gaugeId: id,
        measuredOn: cast.date(days),
      });
  }
}

async function existingGauges(
  core: Core,
  cast: DemoCast,
  pack: SeededPackage,
): Promise<{ id: string; code: string }[]> {
  return core.db.reader.query('SELECT id, code FROM gauges WHERE organisation_id = ?', [
    cast.suppliers[pack.supplier].id,
  ]);
}

/** Attaches a document to each element that is to be submitted and says where the rest is kept. */
export async function fillElements(
  seeding: Seeding,
  pack: SeededPackage,
  who: string,
  days: number,
  facts: { part: DemoPart; stated: (code: string) => string },
): Promise<void> {
  const { core, store, cast } = seeding;
  const deed = cast.deed(who, days, 15);
  const elements = await findElements(core.db.reader.manager, pack.submissionId, 'supplier');
  for (const element of elements) {
    if (element.derived || element.demand === 'not-required' || element.state !== 'open') continue;
    const submit = element.demand === 'submit';
    let { version } = element;
    if (submit) {
      const pdf = await documentPdf(element.label, [
        ['Part', `${facts.part.number} ${facts.part.name}`],
        ['Revision', facts.stated(element.code)],
      ]);
      const fileId = await seedFile(deed, store, core.config.dataDir, `${element.code}.pdf`, pdf);
      version = (await attachFile(deed, element.id, fileId)).version;
    }
    await changeElement(deed, element.id, version, {
      state: submit ? 'submitted' : 'kept-at-supplier',
      reason: '',
      statedPart: submit ? facts.part.number : '',
      statedRevision: submit ? facts.stated(element.code) : '',
      dated: submit ? cast.date(days - 3) : null,
      note: '',
    });
  }
}
