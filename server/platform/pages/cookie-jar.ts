// The cookies of one page's drawing: what one question was given, the next one shows.
const readPairs = (header: string): [string, string][] =>
  header
    .split(';')
    .map((pair) => pair.trim())
    .filter((pair) => pair.includes('='))
    .map((pair) => [pair.slice(0, pair.indexOf('=')), pair.slice(pair.indexOf('=') + 1)]);

const isExpired = (attributes: string): boolean => {
  if (/;\s*max-age=(0|-\d+)\s*(;|$)/i.test(attributes)) return true;
  const expires = /;\s*expires=([^;]+)/i.exec(attributes)?.[1];
  return expires !== undefined && Date.parse(expires) <= Date.parse('1970-01-02');
};

export type CookieJar = {
  header(): string;
  take(setCookies: readonly string[]): void;
  /** Every Set-Cookie that came, the last of each name, to go out with the page. */
  given(): string[];
};

export function createCookieJar(header: string): CookieJar {
  const cookies = new Map(readPairs(header));
  const given = new Map<string, string>();
  return {
    header: () => [...cookies].map(([name, value]) => `${name}=${value}`).join('; '),
    take(setCookies) {
      for (const line of setCookies) {
        const [pair] = readPairs(line);
        if (!pair) continue;
        const [name, value] = pair;
        given.set(name, line);
        if (isExpired(line)) cookies.delete(name);
        else cookies.set(name, value);
      }
    },
    given: () => [...given.values()],
  };
}
