// One word a thing, the words of the house; and nothing that a rule elsewhere forbids.
import { describe, expect, test } from 'vitest';
import { listFiles, type SourceFile } from './source-files.ts';

const ours = listFiles(/^(server|src|shared|seeds|fakes|emails|migrations)\/.*\.(ts|tsx|mjs|mjml|css)$/);
const code = ours.filter((file) => /\.(ts|tsx)$/.test(file.path));

/** The statutory words stand in one file; the payment service's own parameter is not ours to name. */
const STATUTORY = 'shared/declarations/statutory-wording.ts';
const lines = (
  files: readonly SourceFile[],
  pattern: RegExp,
  mayStand: (file: SourceFile, line: string) => boolean = () => false,
): string[] =>
  files.flatMap((file) =>
    file.text
      .split('\n')
      .flatMap((line, index) =>
        pattern.test(line) && !mayStand(file, line)
          ? [`${file.path}:${index + 1} ${line.trim().slice(0, 90)}`]
          : [],
      ),
  );

test('there is something to look at', () => expect(code.length).toBeGreaterThan(150));

describe('words', () => {
  test('a gift is a gift, a giver a giver', () => {
    const found = lines(
      ours,
      /\b(donations?|donors?|contributions?|pledgers?)\b/i,
      (file, line) =>
        file.path === STATUTORY || /SI 2016\/1195|Donations to Charity|Small Donations/.test(line),
    );
    expect(found).toEqual([]);
  });

  test('“tax relief” is never our label', () => expect(lines(ours, /tax relief/i)).toEqual([]));

  test('no badge says that something is safe', () => {
    expect(
      lines(
        code.filter((file) => file.path.startsWith('src/')),
        />\s*SAFE\s*</,
      ),
    ).toEqual([]);
  });

  test('no function handles, processes or manages', () => {
    expect(lines(code, /\b(export\s+)?(async\s+)?function\s+(handle|process|manage)[A-Z]/)).toEqual([]);
  });

  test('no field asks for a child’s name', () => expect(lines(ours, /child'?s?[ _-]?name/i)).toEqual([]));

  test('every example address, number and name is invented', () => {
    expect(lines(ours, /@(gmail|hotmail|outlook|yahoo|icloud)\./i)).toEqual([]);
  });
});

describe('code', () => {
  test('has no `any`', () =>
    expect(lines(code, /(:\s*any\s*[;,)=\]}|&>]|\bas any\s*([;,)\]}]|$)|<any>|\bany\[\])/)).toEqual([]));
  test('has no default exports', () => expect(lines(code, /^export default\b/)).toEqual([]));
  test('has no style attribute', () => expect(lines(code, /\sstyle=\{/)).toEqual([]));
  test('commits no transaction by hand', () => expect(lines(code, /\btrx\.(commit|rollback)\(/)).toEqual([]));
  test('silences no type checker', () =>
    expect(lines(code, /@ts-(ignore|nocheck|expect-error)/)).toEqual([]));

  test('reads the environment in the config alone', () => {
    const mayRead = /^(server\/platform\/config\.ts|server\/migrate\.ts|fakes\/[^/]+\/main\.ts)$/;
    expect(lines(code, /process\.env\b/, (file) => mayRead.test(file.path))).toEqual([]);
  });

  test('every file opens with a line that says what it is for', () => {
    const bare = code.filter((file) => !/^(\/\/|\/\*)/.test(file.text) && !file.path.endsWith('.d.ts'));
    expect(bare.map((file) => file.path)).toEqual([]);
  });

  test('stays small: nine files of ten under 200 lines, none over 300', () => {
    const lengths = code
      .map((file) => ({ path: file.path, lines: file.text.split('\n').length }))
      .sort((a, b) => b.lines - a.lines);
    expect(lengths.filter((file) => file.lines > 300)).toEqual([]);
    expect(lengths.filter((file) => file.lines > 200).length).toBeLessThan(code.length / 10);
  });

  test('file names are kebab-case, or the component they export', () => {
    const wrong = code.filter((file) => {
      const name = file.path.split('/').at(-1) ?? '';
      if (/^\d{12}_[a-z_]+\.ts$/.test(name)) return false;
      if (/^[A-Z][A-Za-z0-9]*\.tsx$/.test(name))
        return !new RegExp(`export (function|const) ${name.slice(0, -4)}\\b`).test(file.text);
      return !/^[a-z0-9]+(-[a-z0-9]+)*(\.d)?\.tsx?$/.test(name);
    });
    expect(wrong.map((file) => file.path)).toEqual([]);
  });
});

test('a tracked file speaks of no workplace and no place on a machine', () => {
  const all = listFiles(/\.(ts|tsx|mjs|md|mjml|css|json|html)$/).filter(
    (file) => !/package-lock/.test(file.path),
  );
  expect(lines(all, new RegExp(['/wo' + 'rk/', '\\.lib' + 'rary', '/tmp/le' + 'ad'].join('|')))).toEqual([]);
});
