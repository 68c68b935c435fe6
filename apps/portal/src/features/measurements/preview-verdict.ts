import {
  compileLimits,
  judgeCompiled,
  judgeGeometric,
  type CompiledLimits,
} from '@trammel/metrology/conformance';
import type { Undetermined } from '@trammel/metrology';
import type { SheetCharacteristic } from '@trammel/shared/measurements';

const compiledLimits = new WeakMap<SheetCharacteristic, CompiledLimits | Undetermined>();

export function limitsOf(facts: SheetCharacteristic) {
  return {
    lower: facts.lowerLimit ?? (facts.naturalLower ? '0' : null),
    upper: facts.upperLimit,
    naturalLower: facts.naturalLower && facts.lowerLimit === null,
  };
}

function compiledFor(facts: SheetCharacteristic): CompiledLimits | Undetermined {
  let compiled = compiledLimits.get(facts);
  if (compiled === undefined) compiledLimits.set(facts, (compiled = compileLimits(limitsOf(facts))));
  return compiled;
}

/**
 * Mark of one reading while it is typed, before the server has answered: i, o, u, n, x, or r with the reason where the
 * text is no reading. A preview: the server's answer replaces it.
 */
export function previewMark(
  text: string | null,
  facts: SheetCharacteristic,
  size: { facts: SheetCharacteristic; text: string | null } | null,
): { mark: string; reason: string | null } {
  if (text === null) return { mark: 'n', reason: null };
  const word = text.toLowerCase();
  const takesWords = facts.kind === 'attribute' || facts.kind === 'note' || facts.attributeAllowed;
  if (word === 'pass' || word === 'fail') {
    return takesWords
      ? { mark: word === 'pass' ? 'i' : 'o', reason: null }
      : { mark: 'r', reason: `Balloon ${facts.balloon} needs a measured value in ${facts.unit}.` };
  }
  if (facts.kind === 'attribute' || facts.kind === 'note') {
    return { mark: 'r', reason: `Balloon ${facts.balloon} is checked, not measured: enter pass or fail.` };
  }
  // A unit behind the number is converted by the server, which then says whether it fits.
  if (/\d\s*[^\d\s.,]+\S*$/u.test(text)) return { mark: 'u', reason: null };
  const compiled = compiledFor(facts);
  if ('undetermined' in compiled) return { mark: 'u', reason: compiled.reason };
  const judged = judgeCompiled(text, compiled);
  if (judged.verdict === 'not-measured')
    return { mark: 'r', reason: judged.reason ?? 'This is not a number.' };
  if (facts.kind === 'reference' || facts.kind === 'basic') return { mark: 'x', reason: null };
  const geometric = facts.geometric;
  if (geometric === null || geometric.modifier === 'RFS')
    return { mark: letter(judged.verdict), reason: null };
  const withBonus = judgeGeometric({
    reading: text,
    tolerance: facts.upperLimit ?? '0',
    modifier: geometric.modifier,
    feature: geometric.feature === 'external' ? 'shaft' : 'hole',
    sizeLimits: size ? limitsOf(size.facts) : null,
    actualSize: size?.text ?? null,
  });
  return { mark: 'undetermined' in withBonus ? 'u' : letter(withBonus.verdict), reason: null };
}

function letter(verdict: string): string {
  return verdict === 'in-tolerance'
    ? 'i'
    : verdict === 'out-of-tolerance'
      ? 'o'
      : verdict === 'undecided'
        ? 'u'
        : 'n';
}
