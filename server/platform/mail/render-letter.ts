// Turns a letter's MJML into HTML once, and then only puts escaped values into the finished HTML.
import { readFile } from 'node:fs/promises';
import mjml2html from 'mjml';
import { toHtml, type SafeHtml } from './letter-html.ts';

const LETTERS = new URL('../../../emails/', import.meta.url);
const PARTIAL = /\{\{>\s*([a-z-]+)\s*\}\}/g;
const PLACE = /\{\{([a-zA-Z]+)\}\}/g;
const NAME = /^[a-z-]+\/[a-z-]+$/;

const compiled = new Map<string, Promise<string>>();

async function readWithPartials(path: string): Promise<string> {
  const source = await readFile(new URL(path, LETTERS), 'utf8');
  const names = [...new Set([...source.matchAll(PARTIAL)].map((match) => match[1] ?? ''))];
  const partials = new Map(
    await Promise.all(
      names.map(
        async (name) => [name, await readFile(new URL(`layout/${name}.mjml`, LETTERS), 'utf8')] as const,
      ),
    ),
  );
  return source.replaceAll(PARTIAL, (_, name: string) => partials.get(name) ?? '');
}

async function compile(name: string): Promise<string> {
  if (!NAME.test(name)) throw new RangeError(`${name} is no letter`);
  const { html } = await mjml2html(await readWithPartials(`${name}.mjml`), {
    validationLevel: 'strict',
    keepComments: false,
  });
  return html;
}

function findCompiled(name: string): Promise<string> {
  const known = compiled.get(name);
  if (known) return known;
  const fresh = compile(name);
  compiled.set(name, fresh);
  fresh.catch(() => compiled.delete(name));
  return fresh;
}

export type LetterParts = {
  /** Room and name, such as `giving/gift-thanks`. */
  template: string;
  /** A name that ends in `Url` must be a web address; everything else is text or a piece built by `html`. */
  values: Readonly<Record<string, string | SafeHtml>>;
  plain: string;
};

function fillPlace(key: string, values: LetterParts['values']): string {
  const value = values[key];
  if (value === undefined) throw new RangeError(`the letter needs a value for ${key}`);
  if (key.endsWith('Url') && !(typeof value === 'string' && /^https?:\/\/[^\s"'<>]+$/.test(value)))
    throw new RangeError(`${key} is no web address`);
  return toHtml(value);
}

/** @throws RangeError when a place of the letter has no value: an unfilled letter is never sent. */
export async function renderLetter({
  template,
  values,
  plain,
}: LetterParts): Promise<{ html: string; plain: string }> {
  const source = await findCompiled(template);
  return { html: source.replaceAll(PLACE, (_, key: string) => fillPlace(key, values)), plain };
}
