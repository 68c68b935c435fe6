import { unavailable } from '../../http/problems.ts';
import { TableRefused } from '../../tables/table.ts';
import { workerEntry, WorkerPool } from '../../tables/worker-pool.ts';
import type { Faces } from './faces/build-faces.ts';
import type { ReportScene } from './report-scene.ts';
import type { FacesTask, PdfTask, TableTask } from './reports.worker.ts';

const seconds = 60;
const atOnce = 2;
/** Documents that may wait; further ones are asked to come back, so that none waits for minutes. */
const waiting = 20;

let pool: WorkerPool | undefined;
let faces: Promise<Faces> | undefined;
let running = 0;

export type ReportKind = PdfTask['kind'] | TableTask['kind'];

/** Makes a document away from the thread that serves everyone, within its time and a bounded number at once. */
export async function makeReport(kind: ReportKind, scene: ReportScene): Promise<Uint8Array> {
  if (running >= atOnce + waiting)
    throw unavailable('Many documents are being made. Ask again in half a minute.');
  running += 1;
  try {
    const task =
      kind === 'results-csv' || kind === 'results-xlsx'
        ? { kind, scene }
        : { kind, scene, faces: await drawnFaces() };
    return (await run(task)) as Uint8Array;
  } catch (error) {
    if (!(error instanceof TableRefused)) throw error;
    throw unavailable(
      `This document could not be made within ${seconds} seconds and the memory given to one. Ask again later.`,
    );
  } finally {
    running -= 1;
  }
}

function run(task: FacesTask | PdfTask | TableTask): Promise<unknown> {
  pool ??= new WorkerPool(workerEntry(import.meta.url, 'reports.worker'), atOnce, seconds);
  return pool.run(task);
}

/** Drawn once a process and kept: threads come and go. */
function drawnFaces(): Promise<Faces> {
  faces ??= (run({ kind: 'faces' }) as Promise<Faces>).catch((error: unknown) => {
    faces = undefined;
    throw error;
  });
  return faces;
}
