import type { PDFDocumentProxy, RenderTask } from 'pdfjs-dist';
import { useEffect, useRef, useState } from 'react';

interface PdfPageProps {
  document: PDFDocumentProxy;
  page: number;
  /** Pixels of the page's width on screen. */
  width: number;
  rotation: number;
  label: string;
}

/** Most pixels a canvas is given: a large sheet zoomed in would otherwise take the memory of the tab. */
const mostPixels = 24_000_000;

export function PdfPage({ document, page, width, rotation, label }: PdfPageProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const [failed, setFailed] = useState(false);
  useEffect(() => {
    let task: RenderTask | null = null;
    let left = false;
    const draw = async () => {
      const sheet = await document.getPage(page);
      const target = canvas.current;
      if (left || target === null) return;
      const turned = (sheet.rotate + rotation) % 360;
      const plain = sheet.getViewport({ scale: 1, rotation: turned });
      const shown = width / plain.width;
      const fine = Math.min(
        window.devicePixelRatio || 1,
        Math.sqrt(mostPixels / (plain.width * plain.height)) / shown,
      );
      const viewport = sheet.getViewport({ scale: shown * fine, rotation: turned });
      target.width = Math.floor(viewport.width);
      target.height = Math.floor(viewport.height);
      target.style.width = `${Math.floor(plain.width * shown)}px`;
      target.style.height = `${Math.floor(plain.height * shown)}px`;
      task = sheet.render({ canvas: target, viewport });
      await task.promise;
      setFailed(false);
    };
    draw().catch((error: unknown) => {
      if (!left && !(error instanceof Error && error.name === 'RenderingCancelledException')) setFailed(true);
    });
    return () => {
      left = true;
      task?.cancel();
    };
  }, [document, page, width, rotation]);
  return (
    <>
      {failed && (
        <p className="p-3 text-vermilion">
          This page could not be drawn. Download the file to look at it in another program.
        </p>
      )}
      <canvas ref={canvas} role="img" aria-label={label} className="mx-auto block bg-white" />
    </>
  );
}
