import { randomBytes } from 'node:crypto';
import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import type { Readable } from 'node:stream';
import {
  CreateBucketCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  PutObjectCommand,
  S3Client,
} from '@aws-sdk/client-s3';
import type { Config } from '../config.ts';
import { unavailable } from '../http/problems.ts';

export interface ReceivedFile {
  /** Complete on disk before anything is sent: a body that breaks off would leave half an object behind. */
  readonly path: string;
  readonly size: number;
  readonly sha256: string;
}

export interface ByteRange {
  readonly start: number;
  readonly end: number;
}

/** The object store. Keys are made here and are random: nothing a person typed is ever part of one. */
export class FileStore {
  private readonly client: S3Client;

  constructor(private readonly settings: Config['s3']) {
    this.client = new S3Client({
      region: settings.region,
      ...(settings.endpoint && { endpoint: settings.endpoint, forcePathStyle: true }),
      credentials: { accessKeyId: settings.accessKeyId, secretAccessKey: settings.secretAccessKey },
      // With the defaults a streamed body is framed in chunks that some stores keep as content.
      requestChecksumCalculation: 'WHEN_REQUIRED',
      responseChecksumValidation: 'WHEN_REQUIRED',
      maxAttempts: 2,
    });
  }

  /** Creates the bucket where it is missing, as in a trial. */
  async prepare(): Promise<void> {
    try {
      await this.client.send(new HeadBucketCommand({ Bucket: this.settings.bucket }));
    } catch {
      await this.client.send(new CreateBucketCommand({ Bucket: this.settings.bucket }));
    }
  }

  newKey(organisationId: string): string {
    const owner = createHash('sha256').update(organisationId).digest('hex').slice(0, 16);
    return `${owner}/${randomBytes(24).toString('hex')}`;
  }

  /** Stores the file and reads it back: it counts as received only when the store returns the same bytes. */
  async put(key: string, file: ReceivedFile, mediaType: string): Promise<void> {
    const body = createReadStream(file.path);
    try {
      await this.sending(
        new PutObjectCommand({
          Bucket: this.settings.bucket,
          Key: key,
          Body: body,
          ContentLength: file.size,
          ContentType: mediaType,
          IfNoneMatch: '*',
        }),
      );
    } finally {
      body.destroy();
    }
    const hash = createHash('sha256');
    let size = 0;
    for await (const chunk of await this.open(key)) {
      hash.update(chunk as Buffer);
      size += (chunk as Buffer).length;
    }
    if (size !== file.size || hash.digest('hex') !== file.sha256) {
      await this.remove(key);
      throw unavailable('The file was not stored whole. Send it again.');
    }
  }

  async open(key: string, range?: ByteRange): Promise<Readable> {
    const answer = await this.sending(
      new GetObjectCommand({
        Bucket: this.settings.bucket,
        Key: key,
        ...(range && { Range: `bytes=${range.start}-${range.end}` }),
      }),
    );
    return answer.Body as Readable;
  }

  async remove(key: string): Promise<void> {
    await this.client.send(new DeleteObjectCommand({ Bucket: this.settings.bucket, Key: key }));
  }

  async isReachable(): Promise<boolean> {
    try {
      await this.client.send(new HeadBucketCommand({ Bucket: this.settings.bucket }), {
        abortSignal: AbortSignal.timeout(2000),
      });
      return true;
    } catch {
      return false;
    }
  }

  close(): void {
    this.client.destroy();
  }

  private async sending(command: PutObjectCommand): Promise<unknown>;
  private async sending(command: GetObjectCommand): Promise<{ Body?: unknown }>;
  private async sending(command: PutObjectCommand | GetObjectCommand): Promise<unknown> {
    try {
      return await this.client.send(command as GetObjectCommand, {
        abortSignal: AbortSignal.timeout(120_000),
      });
    } catch {
      throw unavailable(
        'The file store does not answer just now. Nothing was changed; try again in a minute.',
      );
    }
  }
}
