const BROWSERS: readonly (readonly [RegExp, string])[] = [
  [/\bEdg(?:e|A|iOS)?\//, 'Edge'],
  [/\bOPR\//, 'Opera'],
  [/\b(?:Firefox|FxiOS)\//, 'Firefox'],
  [/\b(?:Chrome|CriOS|HeadlessChrome|Chromium)\//, 'Chrome'],
  [/\bSafari\//, 'Safari'],
];
const SYSTEMS: readonly (readonly [RegExp, string])[] = [
  [/\b(?:iPhone|iPad)\b/, 'iOS'],
  [/\bAndroid\b/, 'Android'],
  [/\bWindows\b/, 'Windows'],
  [/\bMac OS X\b|\bMacintosh\b/, 'macOS'],
  [/\bLinux\b/, 'Linux'],
];

const first = (list: typeof BROWSERS, text: string) => list.find(([pattern]) => pattern.test(text))?.[1];

/** "Firefox on Linux", as far as a browser's own word goes. */
export function deviceName(userAgent: string): string {
  const browser = first(BROWSERS, userAgent) ?? 'A browser';
  const system = first(SYSTEMS, userAgent);
  return system ? `${browser} on ${system}` : browser;
}
