// The campaign's name as it reads inside a sentence.

const ARTICLE = /^(the|a|an)\s+/i;

/** “The Lampwoman” in the middle of a sentence: “the Lampwoman”. */
export const inSentence = (name: string): string =>
  name.replace(ARTICLE, (_, article: string) => `${article.toLowerCase()} `);
