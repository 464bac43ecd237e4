// The very words that the giver read: the appeal, the declaration and the question of consent, by version.
import type { GiftChain } from '#shared/giving/desk-schemas.ts';

const CHANNELS = { email: 'e-mail', post: 'post', phone: 'telephone' } as const;

export function GiftWordings({ gift: { appeal, declaration, consents } }: { gift: GiftChain }) {
  const consent = consents[0];
  return (
    <section className="sec" aria-labelledby="wordings">
      <h2 id="wordings">What the giver read</h2>
      <dl className="wordings">
        <dt>Appeal, wording {appeal.version}</dt>
        <dd>
          <p>{appeal.purpose}</p>
          <p>
            <b>Should it fall short:</b> {appeal.onShortfall}
          </p>
          <p>
            <b>Should more come:</b> {appeal.onSurplus}
          </p>
        </dd>
        {declaration && (
          <>
            <dt>Declaration, wording {declaration.version}</dt>
            <dd>
              <p>{declaration.wording}</p>
            </dd>
          </>
        )}
        {consent && (
          <>
            <dt>Consent, wording {consent.version}</dt>
            <dd>
              <p>{consent.wording}</p>
              <ul className="yesno">
                {consents.map((one) => (
                  <li key={one.channel}>
                    {CHANNELS[one.channel]}:{' '}
                    <b className={one.isGiven ? 'yes' : 'no'}>{one.isGiven ? 'yes' : 'no'}</b>
                  </li>
                ))}
              </ul>
            </dd>
          </>
        )}
      </dl>
    </section>
  );
}
