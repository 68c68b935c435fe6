import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { ApiProblem, NetworkFailure, problemBase, type ProblemName } from './api-problem.ts';
import { Autosave } from './autosave.ts';
import { countDrafts, draftKey, dropDrafts, readDraft, writeDraft } from './draft-storage.ts';

const key = draftKey('person-1', 'remark.4');
const refusal = (name: ProblemName, current?: unknown) =>
  new ApiProblem({
    type: problemBase + name,
    title: name,
    status: 400,
    detail: name,
    instance: '/',
    current,
  });

function make(
  save: (value: string, version: number) => Promise<{ version: number }>,
  initial = 'a',
  version = 1,
) {
  return new Autosave<string>({ key, initial, version, save, delayMs: 500 });
}

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

describe('autosave', () => {
  it('saves once, a moment after the last change, and raises the version', async () => {
    const save = vi.fn((_value: string, version: number) => Promise.resolve({ version: version + 1 }));
    const autosave = make(save);
    autosave.change('ab');
    await vi.advanceTimersByTimeAsync(300);
    autosave.change('abc');
    expect(autosave.read().state).toBe('waiting');
    await vi.advanceTimersByTimeAsync(499);
    expect(save).not.toHaveBeenCalled();
    await vi.advanceTimersByTimeAsync(1);
    expect(save.mock.calls.map(([value, version]) => [value, version])).toEqual([['abc', 1]]);
    expect(autosave.read().state).toBe('saved');
    autosave.change('abcd');
    await vi.advanceTimersByTimeAsync(500);
    expect(save.mock.calls.at(-1)?.slice(0, 2)).toEqual(['abcd', 2]);
  });

  it('keeps a copy in the browser until the server has it', async () => {
    const autosave = make(() => Promise.resolve({ version: 2 }));
    autosave.change('ab');
    expect(readDraft(key)).toMatchObject({ value: 'ab', version: 1 });
    await vi.advanceTimersByTimeAsync(500);
    expect(readDraft(key)).toBeNull();
  });

  it('goes on trying when the connection is lost, and loses nothing', async () => {
    const save = vi
      .fn<(value: string, version: number) => Promise<{ version: number }>>()
      .mockRejectedValueOnce(new NetworkFailure(new Error('down')))
      .mockResolvedValue({ version: 2 });
    const autosave = make(save);
    autosave.change('ab');
    await vi.advanceTimersByTimeAsync(500);
    expect(autosave.read().state).toBe('offline');
    expect(readDraft(key)).toMatchObject({ value: 'ab' });
    await vi.advanceTimersByTimeAsync(2000);
    expect(autosave.read().state).toBe('saved');
    expect(save).toHaveBeenCalledTimes(2);
  });

  it('never writes over a newer version: it asks, and saves on the version that was seen', async () => {
    const save = vi
      .fn<(value: string, version: number) => Promise<{ version: number }>>()
      .mockRejectedValueOnce(refusal('stale-version', { text: 'theirs', version: 5 }))
      .mockResolvedValue({ version: 6 });
    const autosave = make(save);
    autosave.change('mine');
    await vi.advanceTimersByTimeAsync(500);
    expect(autosave.read()).toMatchObject({
      state: 'conflict',
      conflict: { mine: 'mine', theirs: { text: 'theirs' } },
    });
    autosave.change('mine too');
    await vi.advanceTimersByTimeAsync(60_000);
    expect(save).toHaveBeenCalledTimes(1);
    autosave.resolve('mine', { value: 'theirs', version: 5 });
    await vi.advanceTimersByTimeAsync(0);
    expect(save.mock.calls.at(-1)?.slice(0, 2)).toEqual(['mine too', 5]);
    expect(autosave.read().state).toBe('saved');
  });

  it('takes the newer value when the person chooses it', async () => {
    const save = vi
      .fn<(value: string, version: number) => Promise<{ version: number }>>()
      .mockRejectedValue(refusal('stale-version'));
    const autosave = make(save);
    autosave.change('mine');
    await vi.advanceTimersByTimeAsync(500);
    autosave.resolve('theirs', { value: 'theirs', version: 5 });
    await vi.advanceTimersByTimeAsync(5000);
    expect(save).toHaveBeenCalledTimes(1);
    expect(readDraft(key)).toBeNull();
  });

  it('says what was refused and tries again with the next change', async () => {
    const save = vi
      .fn<(value: string, version: number) => Promise<{ version: number }>>()
      .mockRejectedValueOnce(refusal('invalid'))
      .mockResolvedValue({ version: 2 });
    const autosave = make(save);
    autosave.change('bad');
    await vi.advanceTimersByTimeAsync(500);
    expect(autosave.read().state).toBe('refused');
    expect(autosave.read().problem?.is('invalid')).toBe(true);
    autosave.change('good');
    await vi.advanceTimersByTimeAsync(500);
    expect(autosave.read()).toMatchObject({ state: 'saved', problem: null });
  });

  it('saves what was typed while a save was under way', async () => {
    const finish: ((value: { version: number }) => void)[] = [];
    const save = vi.fn(
      (_value: string, _version: number) =>
        new Promise<{ version: number }>((resolve) => finish.push(resolve)),
    );
    const autosave = make(save);
    autosave.change('ab');
    await vi.advanceTimersByTimeAsync(500);
    autosave.change('abc');
    finish[0]?.({ version: 2 });
    await vi.advanceTimersByTimeAsync(500);
    expect(save.mock.calls.map(([value, version]) => [value, version])).toEqual([
      ['ab', 1],
      ['abc', 2],
    ]);
  });
});

describe('a draft left by a closed tab', () => {
  it('comes back when nothing newer stands on the server', () => {
    writeDraft(key, { value: 'left', version: 1, at: '2026-12-01T00:00:00.000Z' });
    expect(make(() => Promise.resolve({ version: 2 })).recover()).toBe('left');
  });

  it('is shown beside the newer value otherwise', () => {
    writeDraft(key, { value: 'left', version: 1, at: '2026-12-01T00:00:00.000Z' });
    const autosave = make(() => Promise.resolve({ version: 4 }), 'newer', 3);
    expect(autosave.recover()).toBeNull();
    expect(autosave.read().conflict).toEqual({ mine: 'left', theirs: 'newer' });
  });

  it('does not give way to what is typed before the choice', async () => {
    writeDraft(key, { value: 'left', version: 1, at: '2026-12-01T00:00:00.000Z' });
    const save = vi.fn((_value: string, version: number) => Promise.resolve({ version: version + 1 }));
    const autosave = make(save, 'newer', 3);
    autosave.recover();
    autosave.change('newer and more');
    expect(readDraft(key)).toMatchObject({ value: 'left' });
    expect(autosave.resolve('theirs', { value: 'newer', version: 3 })).toBe('newer and more');
    await vi.advanceTimersByTimeAsync(0);
    expect(save.mock.calls[0]?.slice(0, 2)).toEqual(['newer and more', 3]);
  });

  it('of another person goes at sign-in, and every one at sign-out', () => {
    writeDraft(key, { value: 'x', version: 1, at: '' });
    writeDraft(draftKey('person-2', 'y'), { value: 'y', version: 1, at: '' });
    dropDrafts('person-2');
    expect(countDrafts()).toBe(1);
    dropDrafts();
    expect(countDrafts()).toBe(0);
  });
});
