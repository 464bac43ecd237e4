// The very words that the giver read: the appeal, the declaration and the question of consent, by version.
import type { ReactNode } from 'react';
import type { GiftChain } from '#shared/giving/desk-schemas.ts';

const CHANNELS = { email: 'e-mail', post: 'post', phone: 'telephone' } as const;

function Wording({ name, version, children }: { name: string; version: number; children: ReactNode }) {
  return (
    <>
      <dt>
        {name}, wording {version}
      </dt>
      <dd>{children}</dd>
    </>
  );
}

function Answers({ consents }: Pick<GiftChain, 'consents'>) {
  return (
    <ul className="yesno">
      {consents.map(({ channel, isGiven }) => (
        <li key={channel}>
          {CHANNELS[channel]}: <b className={isGiven ? 'yes' : 'no'}>{isGiven ? 'yes' : 'no'}</b>
        </li>
      ))}
    </ul>
  );
}

export function GiftWordings({ gift: { appeal, declaration, consents } }: { gift: GiftChain }) {
  const [consent] = consents;
  return (
    <section className="sec" aria-labelledby="wordings">
      <h2 id="wordings">What the giver read</h2>
      <dl className="wordings">
        <Wording name="Appeal" version={appeal.version}>
          <p>{appeal.purpose}</p>
          <p>
            <b>Should it fall short:</b> {appeal.onShortfall}
          </p>
          <p>
            <b>Should more come:</b> {appeal.onSurplus}
          </p>
        </Wording>
        {declaration && (
          <Wording name="Declaration" version={declaration.version}>
            <p>{declaration.wording}</p>
          </Wording>
        )}
        {consent && (
          <Wording name="Consent" version={consent.version}>
            <p>{consent.wording}</p>
            <Answers consents={consents} />
          </Wording>
        )}
      </dl>
    </section>
  );
}
