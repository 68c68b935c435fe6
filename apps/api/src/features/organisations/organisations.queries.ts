import type { DataSource } from 'typeorm';
import { readStatement } from '../../database/raw.ts';

export interface SiteRow {
  readonly id: string;
  readonly organisationId: string;
  readonly name: string;
  readonly address: string;
}

export interface SupplierRow {
  readonly id: string;
  readonly name: string;
  readonly supplierNumber: string;
  readonly linkedAt: string;
  /** Nobody there has set a password yet. */
  readonly waiting: boolean;
}

export function findSites(reader: DataSource, organisationId: string): SiteRow[] {
  return readStatement(
    reader,
    `SELECT id, organisation_id AS organisationId, name, address FROM sites WHERE organisation_id = ? ORDER BY name`,
  ).all(organisationId) as SiteRow[];
}

/** Suppliers of one customer. Whatever else they deliver to whom is never part of it. */
export function findSuppliers(reader: DataSource, customerId: string): SupplierRow[] {
  const rows = readStatement(
    reader,
    `SELECT o.id, o.name, l.supplier_number AS supplierNumber, l.created_at AS linkedAt,
       NOT EXISTS (SELECT 1 FROM users u WHERE u.organisation_id = o.id AND u.password_hash IS NOT NULL) AS waiting
     FROM organisation_links l JOIN organisations o ON o.id = l.supplier_id
     WHERE l.customer_id = ? ORDER BY o.name, o.id LIMIT 2000`,
  ).all(customerId) as (Omit<SupplierRow, 'waiting'> & { waiting: number })[];
  return rows.map((row) => ({ ...row, waiting: row.waiting === 1 }));
}

/** Sites of all suppliers of a customer, in one statement. */
export function findSupplierSites(reader: DataSource, customerId: string): SiteRow[] {
  return readStatement(
    reader,
    `SELECT s.id, s.organisation_id AS organisationId, s.name, s.address
     FROM organisation_links l JOIN sites s ON s.organisation_id = l.supplier_id
     WHERE l.customer_id = ? ORDER BY s.name`,
  ).all(customerId) as SiteRow[];
}

/** The link and the supplier's site, or nothing: what a request may be addressed to. */
export function findSupplierSite(
  reader: DataSource,
  customerId: string,
  supplierId: string,
  siteId: string,
): { supplierName: string; siteName: string } | undefined {
  return readStatement(
    reader,
    `SELECT o.name AS supplierName, s.name AS siteName
     FROM organisation_links l JOIN organisations o ON o.id = l.supplier_id JOIN sites s ON s.organisation_id = o.id
     WHERE l.customer_id = ? AND l.supplier_id = ? AND s.id = ?`,
  ).get(customerId, supplierId, siteId) as { supplierName: string; siteName: string } | undefined;
}
