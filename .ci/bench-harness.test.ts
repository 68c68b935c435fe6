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

let sink = 0;
const burn = (steps: number) => () => {
  for (let step = 0; step < steps; step++) sink = (sink * 31 + step) % 1_000_003;
};
const [little, much] = [burn(500_000), burn(2_500_000)];
// Processor time, because other work on the machine must not decide this test.
const settings = { rounds: 9, warmUp: 2, measure: 'cpu', goal: 1.5 } as const;

describe('the bench harness', () => {
  it('takes the middle value', () => {
    expect(median([9, 1, 5])).toBe(5);
    expect(median([1, 2, 3, 10])).toBe(2.5);
  });

  it('measures both in turns and prints the ratio with its verdict', async () => {
    const slow = await compare('spin', { ...settings, product: much, limit: little });
    expect(slow.ratio).toBeGreaterThan(2);
    expect(slow.ok).toBe(false);
    expect(lines[0]).toMatch(
      /^spin: product [\d.]+ ms cpu, limit [\d.]+ ms cpu, ratio \d\.\d\d \(goal 1\.5\) over$/,
    );
    await compare('spin', { ...settings, product: little, limit: much });
    expect(lines[1]).toMatch(/ ok$/);
  });

  it('waits for what is asynchronous', async () => {
    const nap = () => new Promise((resolve) => setTimeout(resolve, 10));
    const { product } = await compare('nap', { product: nap, limit: little, rounds: 3, warmUp: 0, goal: 1 });
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
