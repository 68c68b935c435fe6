import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { atLeast, atMost, compare, median, memoryAtMost } from './bench-harness.mjs';

let lines: string[];
beforeEach(() => {
  lines = [];
  vi.spyOn(console, 'log').mockImplementation((line: string) => void lines.push(line));
});
afterEach(() => {
  vi.restoreAllMocks();
});

const spin = (ms: number) => () => {
  const until = performance.now() + ms;
  while (performance.now() < until);
};

describe('the bench harness', () => {
  it('takes the middle value', () => {
    expect(median([9, 1, 5])).toBe(5);
    expect(median([1, 2, 3, 10])).toBe(2.5);
  });

  it('measures both in turns and prints the ratio with its verdict', async () => {
    const slow = await compare('spin', { product: spin(6), limit: spin(2), rounds: 5, warmUp: 1, goal: 1.5 });
    expect(slow.ratio).toBeGreaterThan(2);
    expect(slow.ok).toBe(false);
    expect(lines[0]).toMatch(/^spin: product [\d.]+ ms, limit [\d.]+ ms, ratio \d\.\d\d \(goal 1\.5\) over$/);
    await compare('spin', { product: spin(2), limit: spin(6), rounds: 5, warmUp: 1, goal: 1.5 });
    expect(lines[1]).toMatch(/ ok$/);
  });

  it('waits for what is asynchronous', async () => {
    const nap = () => new Promise((resolve) => setTimeout(resolve, 10));
    const { product } = await compare('nap', { product: nap, limit: spin(1), rounds: 3, warmUp: 0, goal: 1 });
    expect(product).toBeGreaterThan(8);
  });

  it('holds a single figure against its goal', () => {
    expect(atMost('first load', 130, 'kB', 136)).toBe(true);
    expect(atLeast('scrolling', 40, 'frames/s', 55)).toBe(false);
    expect(lines).toEqual([
      'first load: 130 kB (goal 136 kB) ok',
      'scrolling: 40.0 frames/s (goal at least 55 frames/s) over',
    ]);
  });

  it('sees the memory a deed takes', async () => {
    let held: Buffer | undefined;
    const take = () => {
      held = Buffer.alloc(128 * 2 ** 20, 1);
    };
    expect(await memoryAtMost('128 MB', take, 64)).toBe(false);
    expect(held?.length).toBe(128 * 2 ** 20);
  });
});
