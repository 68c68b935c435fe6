import { mkdirSync } from 'node:fs';
import S3rver from 's3rver';
import { namesLoopback, serveOnLoopback, type RunningServer } from './loopback-server.ts';

/**
 * A stand-in for an S3-compatible store that keeps its objects in a folder. It checks no signature and would follow
 * `..` in a key out of that folder, so it answers this machine's programs only, never a browser, and no such key.
 */
export async function startStore(directory: string, bucket: string, port: number): Promise<RunningServer> {
  mkdirSync(directory, { recursive: true, mode: 0o700 });
  const store = new S3rver({
    directory,
    silent: true,
    resetOnClose: false,
    vhostBuckets: false,
    configureBuckets: [{ name: bucket }],
  });
  await store.configureBuckets();
  const answer = store.callback();
  return serveOnLoopback(port, (request, response) => {
    const fromBrowser =
      request.headers.origin !== undefined || request.headers['sec-fetch-site'] !== undefined;
    if (fromBrowser || !namesLoopback(request) || leavesFolder(request.url ?? '')) {
      response.writeHead(403).end();
      return;
    }
    answer(request, response);
  });
}

function leavesFolder(url: string): boolean {
  try {
    return decodeURIComponent(url.split('?')[0] ?? '')
      .split(/[/\\]/)
      .includes('..');
  } catch {
    return true;
  }
}
