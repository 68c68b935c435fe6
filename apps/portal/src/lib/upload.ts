import { guardHeaders, problemFromText, type Parser } from './api-client.ts';
import { ContractBreach, NetworkFailure } from './api-problem.ts';

export interface UploadOptions {
  onProgress?: (sentBytes: number, totalBytes: number) => void;
  signal?: AbortSignal;
  idempotencyKey?: string;
}

/** Sends a form with progress by bytes: `fetch` cannot report what it has sent, XMLHttpRequest can. */
export function upload<T>(
  path: string,
  form: FormData,
  parser: Parser<T>,
  options: UploadOptions = {},
): Promise<T> {
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest();
    request.open('POST', path);
    request.setRequestHeader('Accept', 'application/json');
    for (const [name, value] of Object.entries(guardHeaders())) request.setRequestHeader(name, value);
    if (options.idempotencyKey !== undefined)
      request.setRequestHeader('Idempotency-Key', options.idempotencyKey);
    request.upload.onprogress = (event) => options.onProgress?.(event.loaded, event.total);
    request.onerror = () => reject(new NetworkFailure(new Error('The connection broke during the upload.')));
    request.onabort = () => reject(new DOMException('The upload was cancelled.', 'AbortError'));
    request.onload = () => {
      if (request.status < 200 || request.status >= 300) {
        reject(problemFromText(request.status, request.responseText, path));
        return;
      }
      try {
        resolve(parser.parse(JSON.parse(request.responseText)));
      } catch (reason) {
        reject(new ContractBreach(path, reason));
      }
    };
    if (options.signal?.aborted) {
      reject(new DOMException('The upload was cancelled.', 'AbortError'));
      return;
    }
    options.signal?.addEventListener('abort', () => request.abort(), { once: true });
    request.send(form);
  });
}
