import { useState } from 'react';
import { useDropzone, type Accept, type FileRejection } from 'react-dropzone';
import { cn } from '../../lib/cn.ts';
import { showBytes } from '../../lib/format.ts';
import { Notice } from './notice.tsx';

export interface FileDropProps {
  id: string;
  /** What is asked for: `Drawing of revision C`. */
  label: string;
  /** Media types with their extensions, as the contract lists them. */
  accept: Readonly<Record<string, readonly string[]>>;
  maxBytes: number;
  multiple?: boolean;
  disabled?: boolean;
  onFiles: (files: File[]) => void;
}

export function FileDrop({
  id,
  label,
  accept,
  maxBytes,
  multiple = false,
  disabled = false,
  onFiles,
}: FileDropProps) {
  const [refused, setRefused] = useState<{ name: string; reason: string }[]>([]);
  const endings = Object.values(accept).flat();
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({
    accept: accept as Accept,
    maxSize: maxBytes,
    minSize: 1,
    multiple,
    disabled,
    noClick: true,
    noKeyboard: true,
    onDrop: (accepted: File[], rejections: FileRejection[]) => {
      setRefused(
        rejections.map((one) => ({ name: one.file.name, reason: reasonFor(one, endings, maxBytes) })),
      );
      if (accepted.length > 0) onFiles(accepted);
    },
  });
  return (
    <div className="flex flex-col gap-2">
      <div
        {...getRootProps()}
        className={cn(
          'flex flex-wrap items-center gap-x-4 gap-y-2 rounded border border-dashed px-4 py-3',
          isDragActive ? 'border-marking bg-marking/10' : 'border-pencil bg-sheet',
        )}
      >
        <input {...getInputProps({ id, 'aria-label': label })} />
        <div className="min-w-0 flex-1 basis-52">
          <p className="font-medium">{label}</p>
          <p className="caption">
            {endings.join(', ')}, up to {showBytes(maxBytes)}. Drop {multiple ? 'files' : 'the file'} here or
            choose.
          </p>
        </div>
        <button
          type="button"
          disabled={disabled}
          onClick={open}
          aria-label={`Choose ${multiple ? 'files' : 'a file'}: ${label}`}
          className="min-h-8 rounded border border-pencil px-3 font-medium hover:border-marking hover:text-marking disabled:text-pencil pointer-coarse:min-h-10"
        >
          Choose {multiple ? 'files' : 'a file'}
        </button>
      </div>
      {refused.length > 0 && (
        <Notice
          tone="failure"
          live
          title={refused.length === 1 ? 'A file was not taken' : 'Some files were not taken'}
        >
          <ul>
            {refused.map((one) => (
              <li key={one.name} className="break-words">
                {one.name}: {one.reason}
              </li>
            ))}
          </ul>
        </Notice>
      )}
    </div>
  );
}

function reasonFor(rejection: FileRejection, endings: readonly string[], maxBytes: number): string {
  const codes = rejection.errors.map((error) => error.code);
  if (codes.includes('file-invalid-type'))
    return `this kind of file is not accepted here; use ${endings.join(', ')}.`;
  if (codes.includes('file-too-large'))
    return `larger than ${showBytes(maxBytes)}; send a smaller export or split it.`;
  if (codes.includes('file-too-small')) return 'the file is empty; export it again.';
  if (codes.includes('too-many-files')) return 'one file at a time.';
  return rejection.errors[0]?.message ?? 'the file could not be read.';
}
