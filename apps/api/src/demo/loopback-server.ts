import { createServer, type IncomingMessage, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';

export interface RunningServer {
  readonly address: string;
  close(): Promise<void>;
}

/** Refuses a name that merely resolves here: a page of another site must not read the trial's mail or files. */
export function namesLoopback(request: IncomingMessage): boolean {
  return /^(127\.0\.0\.1|localhost|\[::1\])(:\d+)?$/.test(request.headers.host ?? '');
}

/** Serves on this machine only; port 0 takes any free one. */
export async function serveOnLoopback(port: number, handle: RequestListener): Promise<RunningServer> {
  const server = createServer(handle);
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  const { port: taken } = server.address() as AddressInfo;
  return { address: `http://127.0.0.1:${taken}`, close: () => closeNow(server) };
}

function closeNow(server: Server): Promise<void> {
  return new Promise((resolve, reject) => {
    server.close((error) => (error ? reject(error) : resolve()));
    server.closeAllConnections();
  });
}
