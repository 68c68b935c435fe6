import { useRef, useState } from 'react';
import { reasonOf } from '../../lib/api-problem.ts';
import { newIdempotencyKey } from '../../lib/api-client.ts';
import type { Sending } from './api.ts';

interface Previewed {
  readonly importId: string;
}

/** One file on its way from the disk over its preview to its confirmation. */
export function useTableImport<Preview extends Previewed, Outcome>(
  send: (file: File, sending: Sending) => Promise<Preview>,
) {
  const [preview, setPreview] = useState<Preview | null>(null);
  const [progress, setProgress] = useState<{ name: string; sent: number; total: number } | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const [outcome, setOutcome] = useState<Outcome | null>(null);
  const [key, setKey] = useState(newIdempotencyKey);
  const controller = useRef<AbortController | null>(null);

  const start = async (file: File) => {
    const abort = new AbortController();
    controller.current = abort;
    setFailure(null);
    setOutcome(null);
    setPreview(null);
    setKey(newIdempotencyKey());
    setProgress({ name: file.name, sent: 0, total: file.size });
    try {
      const onProgress = (sent: number, total: number) => setProgress({ name: file.name, sent, total });
      setPreview(await send(file, { onProgress, signal: abort.signal }));
    } catch (error) {
      if (!abort.signal.aborted) setFailure(reasonOf(error));
    } finally {
      setProgress(null);
    }
  };
  const doing = async <T>(work: () => Promise<T>, done: (result: T) => void) => {
    setBusy(true);
    setFailure(null);
    try {
      done(await work());
    } catch (error) {
      setFailure(reasonOf(error));
    } finally {
      setBusy(false);
    }
  };
  return {
    preview,
    progress,
    failure,
    busy,
    outcome,
    start: (file: File) => void start(file),
    cancel: () => controller.current?.abort(),
    remap: (work: () => Promise<Preview>) => void doing(work, setPreview),
    confirm: (work: (key: string) => Promise<Outcome>) => void doing(() => work(key), setOutcome),
    again: () => {
      setPreview(null);
      setOutcome(null);
    },
  };
}
