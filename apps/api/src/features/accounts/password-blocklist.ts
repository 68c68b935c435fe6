/** Words that many long passwords are made of. Kept as rules, because lists of leaked passwords are mostly shorter. */
const commonWords = [
  'password', 'passwort', 'passphrase', 'welcome', 'letmein', 'qwerty', 'qwertz', 'azerty', 'asdfgh', 'zxcvbn', 'admin', 'administrator',
  'iloveyou', 'monkey', 'dragon', 'football', 'baseball', 'sunshine', 'princess', 'superman', 'batman', 'trustno', 'shadow', 'master',
  'login', 'secret', 'default', 'changeme', 'trammel', 'supplier', 'customer', 'quality', 'approval', 'company', 'summer', 'winter',
  'spring', 'autumn', 'monday', 'january', 'correct', 'horse', 'battery', 'staple',
] as const; // prettier-ignore

const rows = [
  'qwertyuiop',
  'asdfghjkl',
  'zxcvbnm',
  'qwertzuiop',
  'yxcvbnm',
  '1234567890',
  'abcdefghijklmnopqrstuvwxyz',
];

/**
 * Why a password that is long enough would still be guessed early, or null. The whole password is compared: it may
 * hold any of these words, but must not be made of nothing else.
 */
export function weaknessOf(password: string, ownWords: readonly string[]): string | null {
  const letters = [...password.normalize('NFKC').toLowerCase()]
    .filter((sign) => /[\p{L}\p{N}]/u.test(sign))
    .join('');
  const distinct = new Set(letters);
  if (distinct.size < 5) return 'It repeats the same few characters.';
  if (isRepetition(letters)) return 'It is one short piece repeated.';
  if (isRun(letters)) return 'It follows the order of the alphabet, the digits or the keyboard.';
  const own = ownWords
    .flatMap((words) => words.toLowerCase().split(/[^\p{L}\p{N}]+/u))
    .filter((word) => word.length > 2);
  const rest = remainder(letters, [...own, ...commonWords]);
  if (rest.length < 5) return 'It is made of very common words, or of your name, address or organisation.';
  return null;
}

function isRepetition(text: string): boolean {
  for (let length = 1; length <= 7 && length * 2 <= text.length; length += 1) {
    const piece = text.slice(0, length);
    if (piece.repeat(Math.ceil(text.length / length)).slice(0, text.length) === text) return true;
  }
  return false;
}

function isRun(text: string): boolean {
  return rows.some((row) => {
    const circle = row.repeat(Math.ceil(text.length / row.length) + 1);
    return circle.includes(text) || [...circle].reverse().join('').includes(text);
  });
}

/** What is left after taking out known words, runs of digits and single repeats. */
function remainder(text: string, words: readonly string[]): string {
  const longestFirst = [...words].sort((a, b) => b.length - a.length);
  const without = longestFirst.reduce((left, word) => left.replaceAll(word, ' '), leetUndone(text));
  return without.replace(/\d+/g, '').replace(/\s+/g, '');
}

function leetUndone(text: string): string {
  const signs: Record<string, string> = { '0': 'o', '1': 'i', '3': 'e', '4': 'a', '5': 's', '7': 't' };
  return text.replace(/(?<=\p{L})[013457](?=\p{L})/gu, (digit) => signs[digit] ?? digit);
}
