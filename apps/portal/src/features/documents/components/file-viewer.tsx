import type { PDFDocumentProxy } from 'pdfjs-dist';
import { useEffect, useRef, useState } from 'react';
import type { FileResponse } from '@trammel/shared/documents';
import { Button } from '../../../components/ui/button.tsx';
import { DownloadLink } from '../../../components/ui/link-button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { Progress } from '../../../components/ui/progress.tsx';
import { useKeys } from '../../../lib/use-keys.ts';
import { openPdf, pdfFailure } from '../pdf-document.ts';
import { PdfPage } from './pdf-page.tsx';

const contentOf = (file: FileResponse) => `/api/files/${file.id}/content`;
const steps = [0.25, 0.5, 0.75, 1, 1.5, 2, 3, 4, 6];

/** A drawing beside the rows: pages, zoom, fit to width, turn; pictures are shown as they are. */
export function FileViewer({ file }: { file: FileResponse }) {
  const frame = useRef<HTMLDivElement>(null);
  const [room, setRoom] = useState(0);
  const [zoom, setZoom] = useState(1);
  const [rotation, setRotation] = useState(0);
  const [page, setPage] = useState(1);
  const pdf = usePdf(file);
  useEffect(() => {
    const element = frame.current;
    if (element === null) return;
    const watch = new ResizeObserver(([entry]) => setRoom(entry?.contentRect.width ?? 0));
    watch.observe(element);
    return () => watch.disconnect();
  }, []);
  const pages = pdf.document?.numPages ?? 1;
  const turnTo = (to: number) => setPage(Math.min(Math.max(to, 1), pages));
  const step = (by: 1 | -1) => {
    const next = by === 1 ? steps.find((one) => one > zoom) : [...steps].reverse().find((one) => one < zoom);
    if (next !== undefined) setZoom(next);
  };
  useKeys('Viewer', [
    { keys: 'PageDown', label: 'Next page', run: () => turnTo(page + 1) },
    { keys: 'PageUp', label: 'Page before', run: () => turnTo(page - 1) },
    { keys: '+', label: 'Zoom in', run: () => step(1) },
    { keys: '-', label: 'Zoom out', run: () => step(-1) },
    { keys: '0', label: 'Fit to width', run: () => setZoom(1) },
  ]);
  const isImage = file.mediaType.startsWith('image/');
  return (
    <section
      aria-label={`Viewer: ${file.name}`}
      className="flex min-w-0 flex-col border border-rule bg-sheet"
    >
      <div className="flex flex-wrap items-center gap-1 border-b border-rule px-2 py-1">
        <span className="mr-auto min-w-0 truncate pr-2 font-medium" title={file.name}>
          {file.name}
        </span>
        {!isImage && pages > 1 && (
          <>
            <Button
              size="small"
              weight="quiet"
              aria-label="Page before"
              disabled={page <= 1}
              onClick={() => turnTo(page - 1)}
            >
              ‹
            </Button>
            <span className="figures whitespace-nowrap">
              {page} of {pages}
            </span>
            <Button
              size="small"
              weight="quiet"
              aria-label="Next page"
              disabled={page >= pages}
              onClick={() => turnTo(page + 1)}
            >
              ›
            </Button>
          </>
        )}
        <Button
          size="small"
          weight="quiet"
          aria-label="Zoom out"
          disabled={zoom <= (steps[0] ?? 0)}
          onClick={() => step(-1)}
        >
          −
        </Button>
        <Button
          size="small"
          weight="quiet"
          aria-label={`Zoom ${Math.round(zoom * 100)} percent of the width; fit to width`}
          onClick={() => setZoom(1)}
        >
          <span className="figures">{Math.round(zoom * 100)} %</span>
        </Button>
        <Button
          size="small"
          weight="quiet"
          aria-label="Zoom in"
          disabled={zoom >= (steps.at(-1) ?? 0)}
          onClick={() => step(1)}
        >
          +
        </Button>
        {!isImage && (
          <Button size="small" weight="quiet" onClick={() => setRotation((rotation + 90) % 360)}>
            Turn
          </Button>
        )}
        <DownloadLink size="small" weight="quiet" href={contentOf(file)}>
          Download
        </DownloadLink>
      </div>
      <div
        ref={frame}
        role="group"
        aria-label="Sheet"
        tabIndex={0}
        className="h-[min(70vh,44rem)] overflow-auto bg-paper"
      >
        {pdf.failure !== null && (
          <div className="p-3">
            <Notice tone="failure" title="Not shown">
              {pdf.failure}
            </Notice>
          </div>
        )}
        {pdf.progress !== null && (
          <div className="p-3">
            <Progress
              label="Opening the file"
              done={pdf.progress.loaded}
              total={pdf.progress.total}
              unit="bytes"
            />
          </div>
        )}
        {isImage && <ImageSheet file={file} width={room * zoom} />}
        {pdf.document && room > 0 && (
          <PdfPage
            document={pdf.document}
            page={page}
            width={Math.max(120, room * zoom)}
            rotation={rotation}
            label={`${file.name}, page ${page} of ${pages}`}
          />
        )}
      </div>
    </section>
  );
}

/** The picture is fetched as data: it is served for download only, and never as part of a page. */
function ImageSheet({ file, width }: { file: FileResponse; width: number }) {
  const [url, setUrl] = useState<string | null>(null);
  const [failed, setFailed] = useState(false);
  useEffect(() => {
    let made: string | null = null;
    const left = new AbortController();
    fetch(contentOf(file), { signal: left.signal })
      .then((answer) => (answer.ok ? answer.blob() : Promise.reject(new Error(String(answer.status)))))
      .then((blob) => {
        made = URL.createObjectURL(blob);
        setUrl(made);
      })
      .catch(() => !left.signal.aborted && setFailed(true));
    return () => {
      left.abort();
      if (made !== null) URL.revokeObjectURL(made);
    };
  }, [file]);
  if (failed)
    return (
      <p className="p-3 text-vermilion">
        The picture could not be fetched. Download it to look at it in another program.
      </p>
    );
  return url === null ? null : (
    <img src={url} alt={file.name} className="mx-auto block max-w-none" style={{ width }} />
  );
}

function usePdf(file: FileResponse) {
  const [document, setDocument] = useState<PDFDocumentProxy | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const [progress, setProgress] = useState<{ loaded: number; total: number | null } | null>(null);
  useEffect(() => {
    if (file.mediaType !== 'application/pdf') return;
    let left = false;
    const opened = openPdf(
      contentOf(file),
      (loaded, total) => !left && setProgress({ loaded, total: total > 0 ? total : null }),
    );
    opened.then(
      (pdf) => {
        if (left) return;
        setProgress(null);
        setDocument(pdf.document);
      },
      (error: unknown) => {
        if (left) return;
        setProgress(null);
        setFailure(pdfFailure(error));
      },
    );
    return () => {
      left = true;
      opened.then((pdf) => pdf.close()).catch(() => undefined);
    };
  }, [file]);
  const other = file.mediaType !== 'application/pdf' && !file.mediaType.startsWith('image/');
  return {
    document,
    progress,
    failure: other ? 'Files of this kind are not shown here. Download it.' : failure,
  };
}
