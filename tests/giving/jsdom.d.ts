// The little of jsdom that these tests use; the package brings no types of its own.
declare module 'jsdom' {
  export class JSDOM {
    constructor(html: string);
    readonly window: { readonly document: Document };
  }
}
