import type { IncomingMessage, ServerResponse } from 'node:http';
import { namesLoopback, serveOnLoopback, type RunningServer } from './loopback-server.ts';
import { style } from './mail-page.style.ts';
import { listView, mailView, missingView } from './mail-page.view.ts';
import { openMailbox, type Mailbox } from './mailbox.ts';

const perPage = 50;

interface Answer {
  status: number;
  type: 'text/html' | 'text/css' | 'text/plain';
  body: string | Buffer;
}

const html = (body: string, status = 200): Answer => ({ status, type: 'text/html', body });

async function answerTo(url: URL, mailbox: Mailbox): Promise<Answer> {
  if (url.pathname === '/') {
    const to = url.searchParams.get('to') ?? '';
    const before = url.searchParams.get('before') ?? '';
    return html(listView(await mailbox.list({ to, before, limit: perPage }), to));
  }
  if (url.pathname === '/style.css') return { status: 200, type: 'text/css', body: style };
  const [, id, source] = /^\/mail\/([\w-]+)(\/source)?$/.exec(url.pathname) ?? [];
  if (id && source) {
    const body = await mailbox.readSource(id);
    if (body) return { status: 200, type: 'text/plain', body };
  } else if (id) {
    const mail = await mailbox.read(id);
    if (mail) return html(mailView(mail));
  }
  return html(missingView(), 404);
}

const headers = {
  'Cache-Control': 'no-store',
  'Content-Security-Policy':
    "default-src 'none'; style-src 'self'; form-action 'self'; base-uri 'none'; frame-ancestors 'none'",
  'Referrer-Policy': 'no-referrer',
  'X-Content-Type-Options': 'nosniff',
};

async function handle(request: IncomingMessage, response: ServerResponse, mailbox: Mailbox): Promise<void> {
  if (!namesLoopback(request)) return void response.writeHead(403, headers).end();
  if (request.method !== 'GET' && request.method !== 'HEAD') {
    return void response.writeHead(405, { ...headers, Allow: 'GET, HEAD' }).end();
  }
  const { status, type, body } = await answerTo(new URL(request.url ?? '/', 'http://127.0.0.1'), mailbox);
  response.writeHead(status, { ...headers, 'Content-Type': `${type}; charset=utf-8` });
  response.end(request.method === 'HEAD' ? undefined : body);
}

/** A page to read the caught mail on: this machine only, reading only, no script. */
export function startMailPage(directory: string, port: number): Promise<RunningServer> {
  const mailbox = openMailbox(directory);
  return serveOnLoopback(port, (request, response) => {
    handle(request, response, mailbox).catch((error: unknown) => {
      process.stderr.write(
        `${JSON.stringify({ level: 'error', msg: 'mail page failed', error: String(error) })}\n`,
      );
      if (!response.headersSent) response.writeHead(500, headers);
      response.end();
    });
  });
}
