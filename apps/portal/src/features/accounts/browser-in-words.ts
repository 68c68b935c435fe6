const browsers: readonly [RegExp, string][] = [
  [/\bEdg(?:e|A|iOS)?\//, 'Edge'],
  [/\b(?:OPR|Opera)\//, 'Opera'],
  [/\bFirefox\/|\bFxiOS\//, 'Firefox'],
  [/\bCriOS\/|\bChrom(?:e|ium)\//, 'Chrome or Chromium'],
  [/\bSafari\//, 'Safari'],
];

const systems: readonly [RegExp, string][] = [
  [/\bAndroid\b/, 'Android'],
  [/\b(?:iPhone|iPad)\b/, 'iOS'],
  [/\bWindows\b/, 'Windows'],
  [/\bMac OS X\b/, 'macOS'],
  [/\bLinux\b/, 'Linux'],
];

/** What the browser says of itself, in words; only so that a person can tell two sessions apart. */
export function browserInWords(userAgent: string): string {
  const find = (list: readonly [RegExp, string][]) => list.find(([pattern]) => pattern.test(userAgent))?.[1];
  const browser = find(browsers);
  const system = find(systems);
  if (browser === undefined && system === undefined)
    return userAgent === '' ? 'not stated' : userAgent.slice(0, 60);
  return [browser ?? 'Other browser', system && `on ${system}`].filter(Boolean).join(' ');
}
