import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { reasonOf } from '../../lib/api-problem.ts';
import { attachFile, submissionKey } from './api.ts';

export interface Uploading {
  key: string;
  name: string;
  sent: number;
  total: number;
  cancel: () => void;
}

/** Files on their way to an element: each with its progress, its cancel and, when refused, its reason. */
export function useElementUploads(elementId: string, submissionId: string) {
  const client = useQueryClient();
  const [uploads, setUploads] = useState<Uploading[]>([]);
  const [failures, setFailures] = useState<{ key: string; name: string; reason: string }[]>([]);

  const send = async (file: File) => {
    const key = crypto.randomUUID();
    const controller = new AbortController();
    const drop = () => setUploads((now) => now.filter((upload) => upload.key !== key));
    setUploads((now) => [
      ...now,
      { key, name: file.name, sent: 0, total: file.size, cancel: () => controller.abort() },
    ]);
    try {
      await attachFile(elementId, file, {
        signal: controller.signal,
        onProgress: (sent, total) =>
          setUploads((now) =>
            now.map((upload) => (upload.key === key ? { ...upload, sent, total } : upload)),
          ),
      });
      await client.invalidateQueries({ queryKey: submissionKey(submissionId) });
    } catch (error) {
      if (!controller.signal.aborted) {
        setFailures((now) => [...now, { key, name: file.name, reason: reasonOf(error) }]);
      }
    } finally {
      drop();
    }
  };

  const start = async (files: File[]) => {
    setFailures([]);
    // One after the other: an element's files are attached in the order they were chosen.
    for (const file of files) await send(file);
  };

  return { uploads, failures, start };
}
