// The one error of the start-up: something a person can mend, told in words and without a stack.

export class StartFault extends Error {
  /** @param {string} words what is wrong and what to do @param {string} [detail] the last lines of a log */
  constructor(words, detail = '') {
    super(words);
    this.name = 'StartFault';
    this.detail = detail;
  }
}
