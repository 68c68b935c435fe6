// Starting, watching and ending other programs. Node built-ins only: this runs before anything is installed.
import { spawn } from 'node:child_process';
import { createServer } from 'node:net';
import { dirname } from 'node:path';
import { fileURLToPath } from 'node:url';
import { stripVTControlCharacters } from 'node:util';

export const top = dirname(dirname(fileURLToPath(import.meta.url)));

export class Stop extends Error {}

/**
 * Runs a program to its end. With `quiet` its output is collected instead of shown.
 * @param {string} command
 * @param {string[]} args
 * @param {{ env?: NodeJS.ProcessEnv, quiet?: boolean, limitMs?: number }} [options]
 * @returns {Promise<{ code: number, output: string, seconds: number }>}
 */
export function run(command, args, { env = process.env, quiet = false, limitMs = 0 } = {}) {
  const started = performance.now();
  return new Promise((resolve) => {
    const child = spawn(command, args, {
      cwd: top,
      env,
      stdio: ['ignore', quiet ? 'pipe' : 'inherit', quiet ? 'pipe' : 'inherit'],
      shell: process.platform === 'win32' && !command.endsWith('.exe'),
    });
    let output = '';
    const collect = (/** @type {Buffer} */ chunk) => {
      output += chunk.toString('utf8');
    };
    child.stdout?.on('data', collect);
    child.stderr?.on('data', collect);
    const timer = limitMs
      ? setTimeout(() => {
          output += `\nEnded: it took longer than ${limitMs / 60_000} minutes.\n`;
          child.kill('SIGKILL');
        }, limitMs)
      : undefined;
    const done = (/** @type {number} */ code) => {
      clearTimeout(timer);
      resolve({
        code,
        output: stripVTControlCharacters(output),
        seconds: (performance.now() - started) / 1000,
      });
    };
    child.once('error', (error) => {
      output += `${error.message}\n`;
      done(127);
    });
    child.once('close', (code) => done(code ?? 1));
  });
}

/** @param {string[]} args @param {Parameters<typeof run>[2]} [options] */
export const runNode = (args, options) => run(process.execPath, args, options);

/** @param {string} host @param {number} port @returns {Promise<boolean>} */
export function portIsFree(host, port) {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen(port, host, () => probe.close(() => resolve(true)));
  });
}

/**
 * Programs that live and end together. Each gets a process group of its own, so that Ctrl-C reaches this process
 * alone and the order of stopping is ours.
 */
export function createFamily() {
  /** @type {{ name: string, child: import('node:child_process').ChildProcess, ended: Promise<void> }[]} */
  const members = [];
  let stopping = false;
  /** @type {(name: string, code: number | null) => void} */
  let onLoss = () => undefined;

  /** @param {string} name @param {string[]} args @param {{ env?: NodeJS.ProcessEnv, show?: boolean }} [options] */
  function start(name, args, { env = process.env, show = true } = {}) {
    const child = spawn(process.execPath, args, {
      cwd: top,
      env,
      detached: process.platform !== 'win32',
      stdio: ['ignore', show ? 'inherit' : 'pipe', 'inherit', 'ipc'],
    });
    const ended = new Promise((/** @type {(value: void) => void} */ resolve) => {
      child.once('error', () => resolve());
      child.once('exit', (code) => {
        resolve();
        if (!stopping) onLoss(name, code);
      });
    });
    members.push({ name, child, ended });
    return child;
  }

  /** Last started, first stopped; who has not ended in time is ended. */
  async function stop(patienceMs = 15_000) {
    stopping = true;
    for (const { child, ended } of [...members].reverse()) {
      if (child.exitCode !== null || child.signalCode !== null) continue;
      child.kill('SIGTERM');
      const timer = setTimeout(() => kill(child), patienceMs);
      await ended;
      clearTimeout(timer);
    }
  }

  /** @param {import('node:child_process').ChildProcess} child */
  function kill(child) {
    if (child.pid === undefined) return;
    try {
      process.kill(process.platform === 'win32' ? child.pid : -child.pid, 'SIGKILL');
    } catch {
      // It ended in the meantime.
    }
  }

  return {
    start,
    stop,
    killAll: () => members.forEach(({ child }) => kill(child)),
    /** @param {(name: string, code: number | null) => void} listener */
    whenLost: (listener) => {
      onLoss = listener;
    },
  };
}
