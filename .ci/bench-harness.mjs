// Measures a product against the leanest code for the same job, both in one interleaved run: absolute figures move
// with the machine, the ratio much less.

const clock = {
  wall: () => performance.now(),
  cpu: () => {
    const { user, system } = process.cpuUsage();
    return (user + system) / 1000;
  },
};

/** @param {number[]} values */
export function median(values) {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  const upper = sorted[middle] ?? Number.NaN;
  return sorted.length % 2 ? upper : ((sorted[middle - 1] ?? Number.NaN) + upper) / 2;
}

const figure = (/** @type {number} */ value) => (value >= 100 ? value.toFixed(0) : value.toPrecision(3));

/** @param {string} line @param {boolean} ok */
function verdict(line, ok) {
  console.log(`${line} ${ok ? 'ok' : 'over'}`);
  return ok;
}

/**
 * Prints `name: product X ms, limit Y ms, ratio Z (goal G) ok|over`.
 * @param {string} name
 * @param {{
 *   product: () => unknown,
 *   limit: () => unknown,
 *   goal: number,
 *   rounds?: number,
 *   warmUp?: number,
 *   repeat?: number,
 *   measure?: 'wall' | 'cpu',
 *   before?: () => unknown,
 * }} work `repeat` calls make one measurement; `before` runs unmeasured in front of each
 */
export async function compare(
  name,
  { product, limit, goal, rounds = 15, warmUp = 3, repeat = 1, measure = 'wall', before },
) {
  const now = clock[measure];
  const time = async (/** @type {() => unknown} */ deed) => {
    await before?.();
    globalThis.gc?.();
    const started = now();
    for (let call = 0; call < repeat; call++) await deed();
    return now() - started;
  };
  for (let round = 0; round < warmUp; round++) {
    await time(limit);
    await time(product);
  }
  /** @type {{ product: number[], limit: number[] }} */
  const times = { product: [], limit: [] };
  for (let round = 0; round < rounds; round++) {
    // Whoever goes first meets a colder cache, so they take turns.
    if (round % 2) times.product.push(await time(product));
    times.limit.push(await time(limit));
    if (round % 2 === 0) times.product.push(await time(product));
  }
  const [ours, leanest] = [median(times.product), median(times.limit)];
  const ratio = ours / leanest;
  const unit = measure === 'cpu' ? 'ms cpu' : 'ms';
  const line = `${name}: product ${figure(ours)} ${unit}, limit ${figure(leanest)} ${unit}`;
  const ok = verdict(`${line}, ratio ${ratio.toFixed(2)} (goal ${goal})`, ratio <= goal);
  return { product: ours, limit: leanest, ratio, ok };
}

/**
 * A figure of its own against a ceiling. Prints `name: value unit (goal G unit) ok|over`.
 * @param {string} name @param {number} value @param {string} unit @param {number} goal
 */
export function atMost(name, value, unit, goal) {
  return verdict(`${name}: ${figure(value)} ${unit} (goal ${goal} ${unit})`, value <= goal);
}

/** @param {string} name @param {number} value @param {string} unit @param {number} goal */
export function atLeast(name, value, unit, goal) {
  return verdict(`${name}: ${figure(value)} ${unit} (goal at least ${goal} ${unit})`, value >= goal);
}

/**
 * Peak memory of the whole process above what it held before, worker threads included. The peak never falls again:
 * call this before anything larger runs in the same process.
 * @param {string} name @param {() => unknown} deed @param {number} goalMb
 */
export async function memoryAtMost(name, deed, goalMb) {
  globalThis.gc?.();
  const idle = process.memoryUsage().rss / 2 ** 20;
  await deed();
  const peak = process.resourceUsage().maxRSS / 1024;
  return atMost(`${name}, memory above idle`, Math.max(0, peak - idle), 'MB', goalMb);
}
