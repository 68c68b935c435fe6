import { createHash, randomUUID } from 'node:crypto';
import { createWriteStream, mkdirSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { Transform } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { Request, RequestHandler } from 'express';
import multer, { type StorageEngine } from 'multer';
import { Invalid } from '../http/problems.ts';
import { headBytes, judgeFile, type FilePurpose } from './file-types.ts';

export interface ReceivedUpload {
  readonly path: string;
  readonly name: string;
  readonly mediaType: string;
  readonly size: number;
  readonly sha256: string;
}

interface ReceiveOptions {
  readonly folder: string;
  readonly maxBytes: number;
  readonly purposeOf: (req: Request) => FilePurpose;
}

/**
 * Takes one multipart file in the field `file`. It goes to disk as it comes, hashed and counted on the way, so memory
 * never holds it; its kind is judged on the first bytes, before the rest is taken.
 */
export function receiveFile(options: ReceiveOptions): RequestHandler {
  mkdirSync(options.folder, { recursive: true, mode: 0o700 });
  return multer({
    storage: new JudgingStorage(options),
    defParamCharset: 'utf8',
    limits: { fileSize: options.maxBytes, files: 1, fields: 0, parts: 1, headerPairs: 20, fieldNameSize: 40 },
  }).single('file');
}

export function receivedUpload(req: Request): ReceivedUpload {
  const received = (req.file as (Express.Multer.File & { received?: ReceivedUpload }) | undefined)?.received;
  if (!received) throw new Invalid([{ pointer: '/file', detail: 'Choose a file.' }]);
  return received;
}

class JudgingStorage implements StorageEngine {
  constructor(private readonly options: ReceiveOptions) {}

  _handleFile: StorageEngine['_handleFile'] = (req, file, done) => {
    const path = join(this.options.folder, randomUUID());
    const inspector = new Inspector(this.options.purposeOf(req), file.originalname, file.mimetype);
    pipeline(file.stream, inspector, createWriteStream(path, { mode: 0o600 })).then(
      () =>
        done(null, {
          path,
          size: inspector.size,
          received: inspector.result(path),
        } as Partial<Express.Multer.File>),
      (error: unknown) => {
        file.stream.resume();
        void rm(path, { force: true }).then(() => done(error));
      },
    );
  };

  _removeFile: StorageEngine['_removeFile'] = (_req, file, done) => {
    rm(file.path, { force: true }).then(() => done(null), done);
  };
}

class Inspector extends Transform {
  size = 0;
  private readonly hash = createHash('sha256');
  private head: Buffer[] = [];
  private mediaType: string | undefined;

  constructor(
    private readonly purpose: FilePurpose,
    private readonly fileName: string,
    private readonly declaredType: string,
  ) {
    super();
  }

  override _transform(
    chunk: Buffer,
    _encoding: string,
    next: (error?: Error | null, data?: Buffer) => void,
  ): void {
    this.size += chunk.length;
    this.hash.update(chunk);
    if (this.mediaType === undefined) {
      this.head.push(chunk);
      if (this.size >= headBytes) {
        const fault = this.judge();
        if (fault) {
          next(fault);
          return;
        }
      }
    }
    next(null, chunk);
  }

  override _flush(next: (error?: Error | null) => void): void {
    next(this.mediaType === undefined ? this.judge() : null);
  }

  result(path: string): ReceivedUpload {
    const { fileName: name, mediaType = '', size } = this;
    return { path, name, mediaType, size, sha256: this.hash.digest('hex') };
  }

  private judge(): Invalid | null {
    const head = Buffer.concat(this.head).subarray(0, headBytes);
    this.head = [];
    const verdict = judgeFile(this.purpose, this.fileName, this.declaredType, head);
    if ('refused' in verdict) return new Invalid([{ pointer: '/file', detail: verdict.refused }]);
    this.mediaType = verdict.mediaType;
    return null;
  }
}
