import { z } from 'zod';

export const roles = ['administrator', 'quality-reviewer', 'purchasing', 'supplier-quality'] as const;
export const role = z.enum(roles);
export type Role = z.infer<typeof role>;

export const permissions = [
  'people:manage',
  'links:manage',
  'audit:read',
  'part:read',
  'part:write',
  'request:read',
  'request:write',
  'request:answer',
  'submission:read',
  'measurement:write',
  'gauge:write',
  'file:write',
  'file:read',
  'deviation:ask',
  'deviation:decide',
  'warrant:sign',
  'review:decide',
  'disposition:sign',
  'buying:read',
  'delivery:record',
] as const;
export const permission = z.enum(permissions);
export type Permission = z.infer<typeof permission>;

const ofRole: Record<Role, readonly Permission[]> = {
  administrator: ['people:manage', 'links:manage', 'audit:read'],
  'quality-reviewer': [
    'part:read',
    'part:write',
    'request:read',
    'request:write',
    'submission:read',
    'file:write',
    'file:read',
    'deviation:decide',
    'review:decide',
    'buying:read',
  ],
  purchasing: ['buying:read', 'delivery:record'],
  'supplier-quality': [
    'request:read',
    'request:answer',
    'submission:read',
    'measurement:write',
    'gauge:write',
    'file:write',
    'file:read',
    'deviation:ask',
  ],
};

/** What a person may do at all; on which objects is settled where each object is loaded. */
export function permissionsOf(held: readonly Role[], maySign: boolean): Permission[] {
  const granted = new Set<Permission>(held.flatMap((name) => ofRole[name]));
  if (maySign && held.includes('supplier-quality')) granted.add('warrant:sign');
  if (maySign && held.includes('quality-reviewer')) granted.add('disposition:sign');
  return permissions.filter((name) => granted.has(name));
}
