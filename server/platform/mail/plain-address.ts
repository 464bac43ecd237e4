// Whether a text is one plain mail address. Anything cleverer could send a letter to somebody else.

const MOST_LETTERS = 254;
const MOST_LOCAL_LETTERS = 64;
// Controls, separators and direction marks, and every sign that has a meaning in an address list.
const UNSAFE = /[\p{Cc}\p{Cf}\p{Zs}\p{Zl}\p{Zp},;:<>()[\]\\"]/u;
const LABEL = /^[\p{L}\p{N}\p{M}]([\p{L}\p{N}\p{M}-]*[\p{L}\p{N}\p{M}])?$/u;

/** One address, nothing around it: no list, no display name, no quoted part, no comment. */
export function isPlainAddress(text: string): boolean {
  if (text.length > MOST_LETTERS || UNSAFE.test(text)) return false;
  const [local, domain, ...more] = text.split('@');
  if (!local || !domain || more.length > 0 || local.length > MOST_LOCAL_LETTERS) return false;
  const labels = domain.split('.');
  return labels.length > 1 && labels.every((label) => label.length <= 63 && LABEL.test(label));
}

/** A text that stands in one header line: hidden signs and line breaks become one space. */
export const oneLine = (text: string): string => text.replaceAll(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ').trim();
