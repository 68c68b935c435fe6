import { GetObjectCommand, HeadObjectCommand, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createTransport } from 'nodemailer';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { startMailCatcher } from './mail-catcher.ts';
import { startMailPage } from './mail-page.ts';
import { openMailbox } from './mailbox.ts';
import { startStore } from './store.ts';

let folder: string;
const closers: (() => Promise<void>)[] = [];
const open = async <T extends { close(): Promise<void> }>(starting: Promise<T>): Promise<T> => {
  const server = await starting;
  closers.push(() => server.close());
  return server;
};

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'trammel-demo-'));
});
afterEach(async () => {
  await Promise.all(closers.splice(0).map((close) => close()));
  rmSync(folder, { recursive: true, force: true });
});

/** fetch() hides the Host header and tidies `..` away, so these are sent by hand. */
const status = (address: string, path: string, headers: Record<string, string> = {}, method = 'GET') =>
  new Promise<number | undefined>((resolve, reject) => {
    const { hostname, port } = new URL(address);
    request({ hostname, port, path, method, headers }, (response) => resolve(response.resume().statusCode))
      .on('error', reject)
      .end();
  });

const sender = (port: number) =>
  createTransport({ host: '127.0.0.1', port, ignoreTLS: true }, { from: 'Trammel <trammel@localhost>' });

async function mailService() {
  const catcher = await open(startMailCatcher(folder, 0));
  const page = await open(startMailPage(folder, 0));
  return { transport: sender(catcher.port), address: page.address };
}

describe('the store of the trial', () => {
  const client = (endpoint: string) =>
    new S3Client({
      endpoint,
      region: 'us-east-1',
      forcePathStyle: true,
      credentials: { accessKeyId: 'S3RVER', secretAccessKey: 'S3RVER' },
      requestChecksumCalculation: 'WHEN_REQUIRED',
      responseChecksumValidation: 'WHEN_REQUIRED',
    });

  it('keeps an object over a restart', async () => {
    const body = Buffer.alloc(300_000, 'drawing');
    const first = await startStore(folder, 'trammel', 0);
    await client(first.address).send(new PutObjectCommand({ Bucket: 'trammel', Key: 'files/1', Body: body }));
    await first.close();

    const second = await open(startStore(folder, 'trammel', 0));
    const kept = await client(second.address).send(
      new GetObjectCommand({ Bucket: 'trammel', Key: 'files/1' }),
    );
    expect(Buffer.from((await kept.Body?.transformToByteArray()) ?? []).equals(body)).toBe(true);
    const head = await client(second.address).send(
      new HeadObjectCommand({ Bucket: 'trammel', Key: 'files/1' }),
    );
    expect(head.ContentLength).toBe(300_000);
  });

  it('answers no browser, no foreign host name and no key that leaves its folder', async () => {
    const { address } = await open(startStore(folder, 'trammel', 0));
    expect(await status(address, '/trammel')).toBe(200);
    expect(await status(address, '/trammel', { origin: 'https://elsewhere.example' })).toBe(403);
    expect(await status(address, '/trammel', { 'sec-fetch-site': 'cross-site' })).toBe(403);
    expect(await status(address, '/trammel', { host: 'rebound.example' })).toBe(403);
    expect(await status(address, '/trammel/../../outside', {}, 'PUT')).toBe(403);
    expect(await status(address, '/trammel/%2e%2e%2foutside', {}, 'PUT')).toBe(403);
    expect(await status(address, '/trammel/%zz', {}, 'PUT')).toBe(403);
  });
});

describe('caught mail', () => {
  it('is listed newest first and opens with its links', async () => {
    const { transport, address } = await mailService();
    await transport.sendMail({ to: 'Joana Pell <joana@quillmark.example>', subject: 'First', text: 'one' });
    await transport.sendMail({
      to: 'Dario Wex <dario@oberlyn.example>',
      subject: 'Maß Ø25 geändert',
      text: 'See http://127.0.0.1:4180/requests/7?tab=1&x=2.\n<script>alert(1)</script>',
    });

    const list = await (await fetch(address)).text();
    expect(list.indexOf('Maß Ø25 geändert')).toBeGreaterThan(0);
    expect(list).toContain('<td>Joana Pell &lt;joana@quillmark.example&gt;</td>');
    expect(list.indexOf('Maß Ø25 geändert')).toBeLessThan(list.indexOf('First'));

    const path = /href="(\/mail\/[\w-]+)">Maß/.exec(list)?.[1] ?? '';
    const mail = await (await fetch(address + path)).text();
    expect(mail).toContain('href="http://127.0.0.1:4180/requests/7?tab=1&amp;x=2"');
    expect(mail).toContain('&lt;script&gt;alert(1)&lt;/script&gt;');
    expect(mail).not.toContain('<script>');

    const source = await fetch(`${address}${path}/source`);
    expect(source.headers.get('content-type')).toBe('text/plain; charset=utf-8');
    expect(await source.text()).toContain('To: Dario Wex <dario@oberlyn.example>');
  });

  it('escapes what a sender wrote in the subject and names of files', async () => {
    const { transport, address } = await mailService();
    await transport.sendMail({
      to: 'a@b.example',
      subject: '<img src=x onerror=alert(1)>',
      text: 'x',
      attachments: [{ filename: '<b>.txt', content: 'y' }],
    });
    const list = await (await fetch(address)).text();
    expect(list).toContain('&lt;img src=x onerror=alert(1)&gt;');
    const path = /href="(\/mail\/[\w-]+)"/.exec(list)?.[1] ?? '';
    expect(await (await fetch(address + path)).text()).toContain('<li>&lt;b&gt;.txt (1 bytes)</li>');
  });

  it('filters by recipient and says when nobody matches', async () => {
    const { transport, address } = await mailService();
    await transport.sendMail({ to: 'joana@quillmark.example', subject: 'Yours', text: 'x' });
    expect(await (await fetch(`${address}/?to=QUILLMARK`)).text()).toContain('Yours');
    const none = await (await fetch(`${address}/?to=%3Ci%3E`)).text();
    expect(none).toContain('No mail to “&lt;i&gt;” has been caught.');
    expect(none).not.toContain('Yours');
  });

  it('is read in pages', async () => {
    for (let n = 10; n < 15; n++) {
      writeFileSync(
        join(folder, `17000000000${n}-0000000a.eml`),
        `To: a@b.example\r\nSubject: Mail ${n}\r\n\r\nx`,
      );
    }
    writeFileSync(join(folder, '1700000000099-0000000a.part'), 'half a mail');
    const mailbox = openMailbox(folder);
    const first = await mailbox.list({ to: '', before: '', limit: 3 });
    expect(first.mails.map((mail) => mail.subject)).toEqual(['Mail 14', 'Mail 13', 'Mail 12']);
    const rest = await mailbox.list({ to: '', before: first.olderThan ?? '', limit: 3 });
    expect(rest.mails.map((mail) => mail.subject)).toEqual(['Mail 11', 'Mail 10']);
    expect(rest.olderThan).toBeNull();
  });

  it('is shown by a page that runs no script, changes nothing and opens no other file', async () => {
    const { address } = await mailService();
    const answer = await fetch(address);
    expect(answer.headers.get('content-security-policy')).toContain("default-src 'none'; style-src 'self'");
    expect(await answer.text()).not.toMatch(/<script|<style|\sstyle=|\son\w+=/);
    expect((await fetch(address, { method: 'POST' })).status).toBe(405);
    expect(await status(address, '/', { host: 'rebound.example' })).toBe(403);
    expect((await fetch(`${address}/mail/1700000000000-0000000b`)).status).toBe(404);
    expect(await status(address, '/mail/..%2f..%2fetc%2fpasswd')).toBe(404);
    expect((await fetch(`${address}/style.css`)).headers.get('content-type')).toBe('text/css; charset=utf-8');
  });

  it('refuses a mail beyond the size limit and keeps nothing of it', async () => {
    const { transport } = await mailService();
    const huge = Buffer.alloc(21 * 1024 * 1024, 'a');
    const sending = transport.sendMail({ to: 'a@b.example', subject: 'Huge', raw: huge });
    await expect(sending).rejects.toMatchObject({ responseCode: 552 });
    expect((await openMailbox(folder).list({ to: '', before: '', limit: 9 })).mails).toEqual([]);
  });
});
