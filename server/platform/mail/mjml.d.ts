// The part of the letter compiler that we call; the package brings no types of its own.
declare module 'mjml' {
  type Options = { validationLevel?: 'strict' | 'soft' | 'skip'; keepComments?: boolean };
  function mjml2html(source: string, options?: Options): Promise<{ html: string }>;
  export = mjml2html;
}
