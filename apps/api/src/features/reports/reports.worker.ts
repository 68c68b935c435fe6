import { serveWorker } from '../../tables/serve-worker.ts';
import { buildFaces, type Faces } from './faces/build-faces.ts';
import { resultsPdf } from './pages/results-pdf.ts';
import { warrantPdf } from './pages/warrant-pdf.ts';
import { readingsCsv } from './reading-table.ts';
import { reportRows } from './report-rows.ts';
import type { ReportScene } from './report-scene.ts';
import { resultsWorkbook } from './results-workbook.ts';

export interface FacesTask {
  readonly kind: 'faces';
}
export interface PdfTask {
  readonly kind: 'warrant-pdf' | 'results-pdf';
  readonly scene: ReportScene;
  readonly faces: Faces;
}
export interface TableTask {
  readonly kind: 'results-csv' | 'results-xlsx';
  readonly scene: ReportScene;
}

serveWorker((task: FacesTask | PdfTask | TableTask) => {
  switch (task.kind) {
    case 'faces':
      return buildFaces();
    case 'warrant-pdf':
      return warrantPdf(task.scene, task.faces);
    case 'results-pdf':
      return resultsPdf(task.scene, task.faces);
    case 'results-csv':
      return readingsCsv(reportRows(task.scene));
    case 'results-xlsx':
      return resultsWorkbook(reportRows(task.scene));
  }
});
