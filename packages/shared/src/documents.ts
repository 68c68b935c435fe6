import { z } from 'zod';
import { id, instant } from './primitives.ts';

export const maximumFileBytes = 100 * 1024 * 1024;

export const fileResponse = z
  .object({
    id,
    name: z.string(),
    mediaType: z.string(),
    size: z.int(),
    sha256: z.string().regex(/^[0-9a-f]{64}$/),
    uploadedBy: z.string(),
    uploadedAt: instant,
  })
  .meta({ id: 'File' });
export type FileResponse = z.infer<typeof fileResponse>;

/** Types the store takes; the server checks extension, declared type and the first bytes against each other. */
export const acceptedFiles = {
  drawing: { 'application/pdf': ['.pdf'], 'image/png': ['.png'], 'image/jpeg': ['.jpg', '.jpeg'] },
  evidence: {
    'application/pdf': ['.pdf'],
    'image/png': ['.png'],
    'image/jpeg': ['.jpg', '.jpeg'],
    'text/csv': ['.csv'],
    'text/plain': ['.txt'],
    'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet': ['.xlsx'],
    'application/vnd.openxmlformats-officedocument.wordprocessingml.document': ['.docx'],
    'application/json': ['.json'],
    'model/step': ['.step', '.stp'],
    'application/xml': ['.xml', '.qif'],
  },
} as const satisfies Record<string, Record<string, readonly string[]>>;
