import { readFile, readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { simpleParser, type AddressObject } from 'mailparser';

export interface MailSummary {
  readonly id: string;
  readonly caughtAt: Date;
  readonly from: string;
  readonly to: string;
  readonly subject: string;
}

export interface CaughtMail extends MailSummary {
  readonly text: string;
  readonly attachments: readonly { readonly name: string; readonly bytes: number }[];
}

export interface MailPage {
  readonly mails: readonly MailSummary[];
  /** Pass as `before` to read on; null at the end. */
  readonly olderThan: string | null;
}

const wellFormed = /^\d{13}-[0-9a-f]{8}$/;

const addresses = (field: AddressObject | AddressObject[] | undefined): string =>
  [field ?? []]
    .flat()
    .flatMap((entry) => entry.value)
    .map(({ name, address }) => (name ? `${name} <${address ?? ''}>` : (address ?? '')))
    .join(', ');

/** Reads what the catcher has kept. A mail never changes once its file is there, so summaries are remembered. */
export function openMailbox(directory: string) {
  const remembered = new Map<string, MailSummary>();

  async function ids(): Promise<string[]> {
    const files = await readdir(directory);
    return files
      .filter((file) => file.endsWith('.eml'))
      .map((file) => file.slice(0, -4))
      .filter((id) => wellFormed.test(id))
      .sort()
      .reverse();
  }

  async function read(id: string): Promise<CaughtMail | null> {
    const source = await readSource(id);
    if (!source) return null;
    const mail = await simpleParser(source, { skipHtmlToText: false, skipImageLinks: true });
    return {
      id,
      caughtAt: new Date(Number(id.slice(0, 13))),
      from: addresses(mail.from),
      to: addresses(mail.to),
      subject: mail.subject ?? '(no subject)',
      text: mail.text ?? '',
      attachments: mail.attachments.map((file) => ({ name: file.filename ?? 'unnamed', bytes: file.size })),
    };
  }

  async function readSource(id: string): Promise<Buffer | null> {
    if (!wellFormed.test(id)) return null;
    return readFile(join(directory, `${id}.eml`)).catch((error: NodeJS.ErrnoException) => {
      if (error.code === 'ENOENT') return null;
      throw error;
    });
  }

  async function summary(id: string): Promise<MailSummary | null> {
    const known = remembered.get(id);
    if (known) return known;
    const mail = await read(id);
    if (!mail) return null;
    const { caughtAt, from, to, subject } = mail;
    const short = { id, caughtAt, from, to, subject };
    remembered.set(id, short);
    return short;
  }

  /** Newest first; `to` keeps the mails whose recipient holds that text. */
  async function list(options: { to: string; before: string; limit: number }): Promise<MailPage> {
    const wanted = options.to.trim().toLowerCase();
    const mails: MailSummary[] = [];
    for (const id of await ids()) {
      if (options.before && id >= options.before) continue;
      const mail = await summary(id);
      if (!mail || !mail.to.toLowerCase().includes(wanted)) continue;
      if (mails.length === options.limit) return { mails, olderThan: mails.at(-1)?.id ?? null };
      mails.push(mail);
    }
    return { mails, olderThan: null };
  }

  return { list, read, readSource };
}

export type Mailbox = ReturnType<typeof openMailbox>;
