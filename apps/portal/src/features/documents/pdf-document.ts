import { getDocument, GlobalWorkerOptions, type PDFDocumentProxy } from 'pdfjs-dist';
import workerUrl from 'pdfjs-dist/build/pdf.worker.min.mjs?url';

GlobalWorkerOptions.workerSrc = workerUrl;

/** Character maps, standard fonts and colour profiles travel with the portal; nothing is fetched from elsewhere. */
const resources = '/pdfjs';

export interface OpenPdf {
  readonly document: PDFDocumentProxy;
  readonly close: () => Promise<void>;
}

/** Opens a PDF by ranges. Scripts in the file never run; forms and links are not drawn. */
export async function openPdf(
  url: string,
  onProgress: (loaded: number, total: number) => void,
): Promise<OpenPdf> {
  const task = getDocument({
    url,
    withCredentials: true,
    isEvalSupported: false,
    enableXfa: false,
    useWasm: false,
    cMapUrl: `${resources}/cmaps/`,
    standardFontDataUrl: `${resources}/standard_fonts/`,
    iccUrl: `${resources}/iccs/`,
    wasmUrl: `${resources}/wasm/`,
  });
  task.onProgress = ({ loaded, total }: { loaded: number; total: number }) => onProgress(loaded, total);
  const document = await task.promise;
  return { document, close: () => task.destroy() };
}

/** Why a file could not be opened, for a person. */
export function pdfFailure(error: unknown): string {
  const name = error instanceof Error ? error.name : '';
  if (name === 'PasswordException') return 'The PDF is protected by a password. Ask for a copy without one.';
  if (name === 'InvalidPDFException')
    return 'The file is damaged or not a PDF. Download it to look at it in another program.';
  if (name === 'ResponseException') return 'The file could not be fetched. Try again.';
  return 'The PDF could not be shown. Download it to look at it in another program.';
}
