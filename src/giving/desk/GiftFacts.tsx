// The giver, the declaration and what the gift is for, side by side.
import { dayOf, formatDay } from '#shared/dates.ts';
import type { GiftChain } from '#shared/giving/desk-schemas.ts';
import { formatPence } from '#shared/money.ts';

const NAME_SHOWN = {
  wall: 'On the wall of names, once the words are passed',
  'not-public': 'Hidden from the public',
  'treasurer-only': 'Known to the treasurer only',
} as const;

function Giver({ gift }: { gift: GiftChain }) {
  const { giver } = gift;
  const lines = [giver.greeting && `Greeted as “${giver.greeting}”`, giver.address, giver.email, giver.phone];
  return (
    <section aria-labelledby="giver">
      <h2 id="giver">Giver</h2>
      <p>
        <b>{giver.name}</b>
        {giver.number !== null && <span className="ash"> · supporter {giver.number}</span>}
      </p>
      {lines.filter(Boolean).map((line) => (
        <p key={line}>{line}</p>
      ))}
      <p className="ash">{gift.isWithheld ? NAME_SHOWN['treasurer-only'] : NAME_SHOWN[gift.nameShown]}</p>
    </section>
  );
}

function Declaration({ gift: { declaration, giftAidPence } }: { gift: GiftChain }) {
  if (declaration === null)
    return (
      <section aria-labelledby="declared">
        <h2 id="declared">Declaration</h2>
        <p>None was given with this gift, so no Gift Aid is reckoned.</p>
      </section>
    );
  const stands = declaration.cancelledAt === null;
  return (
    <section aria-labelledby="declared">
      <h2 id="declared">
        Declaration{' '}
        <span className={stands ? 'stamp wee done' : 'stamp wee bad'}>
          {stands ? 'In force' : 'Cancelled'}
        </span>
      </h2>
      <p>
        {declaration.name}
        {declaration.address && `, ${declaration.address}`}
      </p>
      <p>
        Given {formatDay(dayOf(new Date(declaration.givenAt)))}, on wording {declaration.version}
      </p>
      <p>
        {declaration.covers === 'this-gift' ? 'Covers this gift' : 'Covers past, present and future gifts'}:{' '}
        {formatPence(giftAidPence)} of Gift Aid
      </p>
    </section>
  );
}

function Purpose({ gift }: { gift: GiftChain }) {
  return (
    <section aria-labelledby="for">
      <h2 id="for">For</h2>
      <p>
        {gift.towards}
        {gift.appeal.partChoice === 'wish' ? ', a wish within the one appeal' : ', a fund of its own'}
      </p>
      {gift.shares.map((share) => (
        <p key={share.name}>
          {formatPence(share.amountPence)} to {share.name}, {share.fund}
          {!share.isMeant && ': the part was paid for meanwhile'}
        </p>
      ))}
      {gift.payment.feePence !== null && <p className="ash">Card fee {formatPence(gift.payment.feePence)}</p>}
    </section>
  );
}

export function GiftFacts({ gift }: { gift: GiftChain }) {
  return (
    <div className="gift-facts">
      <Giver gift={gift} />
      <Declaration gift={gift} />
      <Purpose gift={gift} />
    </div>
  );
}
