// What we promise everybody who gives: what the money is for, what happens if it falls short, how to complain.
import { useQuery } from '@tanstack/react-query';
import type { AppealWording } from '#shared/campaign/campaign-schemas.ts';
import { useApi } from '#src/lib/use-api.ts';
import { appealQuery } from './appeal-queries.ts';
import { Contact } from './Contact.tsx';
import { useSociety } from './use-society.ts';

function Wording({ wording }: { wording: AppealWording }) {
  return (
    <>
      <h2>What your gift is for</h2>
      <p className="quoted">{wording.purpose}</p>
      <p>
        {wording.partChoice === 'wish'
          ? 'You may choose one part of the figure. Your choice is a wish within the one appeal: we follow it as long as that part still needs money.'
          : 'You may choose one part of the figure. Your gift is then kept for that part alone.'}
      </p>
      <h2>If too little is given</h2>
      <p>{wording.onShortfall}</p>
      <h2>If more is given than is needed</h2>
      <p>{wording.onSurplus}</p>
      <p className="ash small">
        This is version {wording.version} of the appeal’s words. Every gift keeps the version that its giver
        saw.
      </p>
    </>
  );
}

function OurWord() {
  return (
    <>
      <h2>What we promise</h2>
      <ul>
        <li>The sums on this site are gifts that have come in. What is only promised is never counted.</li>
        <li>Gift Aid and grants are told apart from gifts, and never move the line on the figure.</li>
        <li>
          The card service takes a small fee from each gift by card. It is borne by the fund that the gift
          went to, and the books show it. The line shows what you gave, before the fee.
        </li>
        <li>Every gift is thanked, with a receipt.</li>
        <li>Your name is shown only if you ask for it, and exactly as you typed it.</li>
        <li>We write to you only in the ways you agreed to. We never press anybody to give.</li>
        <li>If you gave by mistake, tell us, and we put it right wherever the law lets us.</li>
      </ul>
    </>
  );
}

export function PromisePage() {
  const society = useSociety();
  const { data: appeal } = useQuery(appealQuery(useApi()));
  if (!society || !appeal) return null;
  return (
    <main id="main" className="prose">
      <h1>What we promise givers</h1>
      <p className="lead">
        {society.name} asks for money for one thing: {appeal.name}. Here is what we do with it, in plain
        words.
      </p>
      <Wording wording={appeal.wording} />
      <OurWord />
      <h2>If something is wrong</h2>
      <p>{society.complaints}</p>
      <Contact society={society} />
      <p>
        If our answer does not satisfy you, you can take a complaint about how we ask for money to the
        Fundraising Regulator:{' '}
        <a href="https://www.fundraisingregulator.org.uk">fundraisingregulator.org.uk</a>. Serious worries
        about how a charity is run go to the charity regulator; in England and Wales that is the Charity
        Commission: <a href="https://www.gov.uk/complain-about-charity">gov.uk/complain-about-charity</a>.
      </p>
      <p>{society.registrationStatement}</p>
    </main>
  );
}
