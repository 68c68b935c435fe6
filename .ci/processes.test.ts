import { createServer, type AddressInfo } from 'node:net';
import { createInterface } from 'node:readline';
import type { Readable } from 'node:stream';
import { describe, expect, it } from 'vitest';
import { createFamily, portIsFree, run, runNode } from './processes.mjs';

const firstLine = (child: { stdout: Readable | null }) =>
  new Promise<string>((resolve) => {
    if (child.stdout) createInterface({ input: child.stdout }).once('line', resolve);
  });
const alive = (pid: number) => {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
};
const speaker = (rest: string) => ['-e', `${rest}; console.log('up'); setInterval(() => {}, 1000)`];

describe('running a program', () => {
  it('gives its output and exit code', async () => {
    const result = await runNode(['-e', "console.log('out'); console.error('err'); process.exit(3)"], {
      quiet: true,
    });
    expect(result.code).toBe(3);
    expect(result.output.split('\n').sort()).toEqual(['', 'err', 'out']);
  });

  it('says when there is no such program', async () => {
    const result = await run('no-such-program-here', [], { quiet: true });
    expect(result.code).toBe(127);
    expect(result.output).toContain('ENOENT');
  });

  it('ends a program that takes too long, and says so', async () => {
    const result = await runNode(['-e', 'setInterval(() => {}, 1000)'], { quiet: true, limitMs: 200 });
    expect(result.code).not.toBe(0);
    expect(result.output).toContain('it took longer than');
  });
});

describe('a family of programs', () => {
  it('stops the last started first, and all of them', async () => {
    const family = createFamily();
    const order: string[] = [];
    const children = await Promise.all(
      ['store', 'server'].map(async (name) => {
        const child = family.start(name, speaker(''), { show: false });
        child.once('exit', () => order.push(name));
        await firstLine(child);
        return child;
      }),
    );
    await family.stop();
    expect(order).toEqual(['server', 'store']);
    expect(children.map((child) => alive(child.pid ?? 0))).toEqual([false, false]);
  });

  it('ends a program that ignores the request', async () => {
    const family = createFamily();
    const child = family.start('deaf', speaker("process.on('SIGTERM', () => {})"), { show: false });
    await firstLine(child);
    await family.stop(200);
    expect(child.signalCode).toBe('SIGKILL');
  });

  it('reports a program that ends by itself, but not one it stopped', async () => {
    const family = createFamily();
    const lost: [string, number | null][] = [];
    family.whenLost((name, code) => lost.push([name, code]));
    const failing = family.start('server', ['-e', 'process.exit(7)'], { show: false });
    await new Promise((resolve) => failing.once('exit', resolve));
    await firstLine(family.start('store', speaker(''), { show: false }));
    await family.stop();
    expect(lost).toEqual([['server', 7]]);
  });

  it('leaves nobody behind when its own process is killed', async () => {
    const parent = createFamily();
    const code = `
      import { createFamily } from ${JSON.stringify(new URL('./processes.mjs', import.meta.url).href)};
      const child = createFamily().start('child', ['--import', './.ci/leash.mjs', '-e', 'setInterval(() => {}, 1000)']);
      console.log(child.pid);
      setInterval(() => {}, 1000);`;
    const child = parent.start('parent', ['--input-type=module', '-e', code], { show: false });
    const grandchild = Number(await firstLine(child));
    expect(alive(grandchild)).toBe(true);
    parent.killAll();
    await expect.poll(() => alive(grandchild), { timeout: 5000 }).toBe(false);
  });
});

describe('a port', () => {
  it('is free, or not', async () => {
    const server = createServer();
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    const { port } = server.address() as AddressInfo;
    expect(await portIsFree('127.0.0.1', port)).toBe(false);
    await new Promise((resolve) => server.close(resolve));
    expect(await portIsFree('127.0.0.1', port)).toBe(true);
  });
});
