// The page of codes: who, and the six figures to type now.
import type { PersonCode } from './codes.ts';

type Props = { codes: readonly PersonCode[]; secondsLeft: number };

const spaced = (code: string): string => `${code.slice(0, 3)} ${code.slice(3)}`;

export function CodesPage({ codes, secondsLeft }: Props) {
  return (
    <html lang="en-GB">
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <title>One-time codes of the demonstration</title>
        <link rel="stylesheet" href="/codes.css" />
        <script type="module" src="/codes-page.js" />
        <noscript>
          <meta httpEquiv="refresh" content={String(secondsLeft)} />
        </noscript>
      </head>
      <body>
        <main>
          <h1>One-time codes</h1>
          <p>
            Each of these people would read their code on a phone. This page takes the phone’s place in the
            demonstration.
          </p>
          {codes.length === 0 ? (
            <p>Nobody in the demonstration has a second factor.</p>
          ) : (
            <>
              <dl id="codes">
                {codes.map(({ name, email, roles, code }) => (
                  <div key={email}>
                    <dt>
                      {name}
                      <span>
                        {roles} · {email}
                      </span>
                    </dt>
                    <dd>{spaced(code)}</dd>
                  </div>
                ))}
              </dl>
              <p className="left">
                New codes in <span id="seconds">{secondsLeft}</span> seconds. A code works once.
              </p>
            </>
          )}
        </main>
      </body>
    </html>
  );
}
