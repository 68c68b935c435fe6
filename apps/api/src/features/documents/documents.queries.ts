import type { FileResponse } from '@trammel/shared/documents';
import type { DataSource } from 'typeorm';
import { readStatement } from '../../database/raw.ts';

export interface FileRow {
  readonly id: string;
  readonly organisationId: string;
  readonly name: string;
  readonly mediaType: string;
  readonly size: number;
  readonly sha256: string;
  readonly objectKey: string;
  readonly uploadedByName: string;
  readonly createdAt: string;
}

const columns = `f.id, f.organisation_id AS organisationId, f.name, f.media_type AS mediaType, f.size, f.sha256,
  f.object_key AS objectKey, f.uploaded_by_name AS uploadedByName, f.created_at AS createdAt`;

/**
 * The file if this organisation may read it: its own; the drawing of a revision it was asked to supply; the evidence of
 * a package that was submitted to it. Anything else is nothing, as an id that never was.
 */
export function findReadableFile(
  reader: DataSource,
  organisationId: string,
  fileId: string,
): FileRow | undefined {
  return readStatement(
    reader,
    `SELECT ${columns} FROM stored_files f WHERE f.id = @fileId AND f.state = 'stored' AND (
       f.organisation_id = @organisationId
       OR EXISTS (SELECT 1 FROM part_revisions v JOIN requests r ON r.revision_id = v.id
                  WHERE v.drawing_file_id = f.id AND r.supplier_id = @organisationId AND r.issued_at IS NOT NULL)
       OR EXISTS (SELECT 1 FROM element_files e JOIN submissions s ON s.id = e.submission_id
                  WHERE e.file_id = f.id AND s.customer_id = @organisationId AND s.submitted_at IS NOT NULL))`,
  ).get({ fileId, organisationId }) as FileRow | undefined;
}

/** Bytes and files an organisation keeps here, for its allowance. */
export function findUsage(reader: DataSource, organisationId: string): { bytes: number; files: number } {
  return readStatement(
    reader,
    'SELECT COALESCE(SUM(size), 0) AS bytes, COUNT(*) AS files FROM stored_files WHERE organisation_id = ?',
  ).get(organisationId) as { bytes: number; files: number };
}

/** Also used wherever a file is shown beside what it belongs to. */
export function presentFile(file: Omit<FileRow, 'organisationId' | 'objectKey'>): FileResponse {
  const { id, name, mediaType, size, sha256 } = file;
  return { id, name, mediaType, size, sha256, uploadedBy: file.uploadedByName, uploadedAt: file.createdAt };
}
