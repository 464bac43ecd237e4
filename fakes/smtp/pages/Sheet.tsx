// The frame of every page of the mail stand-in: what it is, said first and plainly.
import type { ReactNode } from 'react';

type Props = { title: string; children: ReactNode };

export function Sheet({ title, children }: Props) {
  return (
    <html lang="en-GB">
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="robots" content="noindex" />
        <title>{title}</title>
        <link rel="icon" href="data:," />
        <link rel="stylesheet" href="/mail.css" />
      </head>
      <body>
        <header className="notice">
          <p>
            <strong>Mail of the demonstration.</strong> Every letter that the site sends comes here. None
            leaves this machine.
          </p>
        </header>
        <main>{children}</main>
      </body>
    </html>
  );
}
