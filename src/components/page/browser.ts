/** "Firefox on Linux" from a User-Agent header; the header's first words where nothing is known. */
const BROWSERS = [
  [/Edg(?:e|A|iOS)?\//, 'Edge'],
  [/OPR\//, 'Opera'],
  [/Firefox\/|FxiOS\//, 'Firefox'],
  [/(?:Headless)?Chrome\/|CriOS\//, 'Chrome'],
  [/Safari\//, 'Safari'],
  [/^curl\//, 'curl'],
] as const;
const SYSTEMS = [
  [/iPhone|iPad/, 'iOS'],
  [/Android/, 'Android'],
  [/Windows/, 'Windows'],
  [/Mac OS X|Macintosh/, 'macOS'],
  [/CrOS/, 'ChromeOS'],
  [/Linux|X11/, 'Linux'],
] as const;

export function browserOf(header: string | null): string {
  if (!header) return 'not told';
  const find = (known: readonly (readonly [RegExp, string])[]) =>
    known.find(([sign]) => sign.test(header))?.[1];
  const [browser, system] = [find(BROWSERS), find(SYSTEMS)];
  if (!browser) return header.slice(0, 40);
  return system ? `${browser} on ${system}` : browser;
}
