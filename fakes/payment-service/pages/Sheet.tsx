// The frame of every page of the stand-in: what it is, said first and plainly.
import type { ReactNode } from 'react';

type Props = { title: string; children: ReactNode; script?: string; isWide?: boolean };

export function Sheet({ title, children, script, isWide = false }: Props) {
  return (
    <html lang="en-GB">
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="robots" content="noindex" />
        <title>{title}</title>
        <link rel="stylesheet" href="/pay/stand-in.css" />
        {script && <script src={script} defer />}
      </head>
      <body className={isWide ? 'wide' : undefined}>
        <header className="notice">
          <p>
            <strong>A stand-in for the demonstration.</strong> No real card is asked for, none is taken, and
            no money moves. Never type the number of a real card here.
          </p>
        </header>
        <main className={isWide ? 'wide' : undefined}>{children}</main>
      </body>
    </html>
  );
}
