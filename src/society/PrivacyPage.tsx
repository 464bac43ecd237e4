// What we keep about people, why, for how long, and whom to ask.
import { Contact } from './Contact.tsx';
import { useSociety } from './use-society.ts';

function WhatWeKeep() {
  return (
    <>
      <h2>What we keep, and why</h2>
      <dl>
        <dt>When you give</dt>
        <dd>
          Your name, your e-mail address, the sum, the day and what you chose: to take the gift, to send your
          receipt and to keep honest books. The law asks us to keep the books.
        </dd>
        <dt>When you make a Gift Aid declaration</dt>
        <dd>
          Your home address and the declaration itself: the tax office requires both, and may ask to see them.
        </dd>
        <dt>When you dedicate a gift</dt>
        <dd>
          The name you give us, and the name and e-mail address of one family contact if you want somebody
          told. We use that address for this one letter and for nothing else.
        </dd>
        <dt>When you ask for your name on the wall</dt>
        <dd>Your words, exactly as you typed them, because you asked us to show them.</dd>
        <dt>When you ask for news</dt>
        <dd>
          Which ways you agreed to, on what day, and the words you agreed to. We write only in those ways, and
          stop as soon as you say so.
        </dd>
        <dt>When you write us a message</dt>
        <dd>
          The message. A person at the desk reads it, and then the people who build her. It is never shown to
          the public.
        </dd>
      </dl>
      <p>
        Your card’s number goes straight to the card service that takes the payment. We never see it and never
        keep it. The card service tells us that a payment was made, its sum and its fee.
      </p>
    </>
  );
}

function HowLong() {
  return (
    <>
      <h2>How long</h2>
      <ul>
        <li>
          A gift and its place in the books: at least six years after the end of the year it belongs to, as
          charity and tax law ask.
        </li>
        <li>A Gift Aid declaration: as long as a claim rests on it, and six years after the last one.</li>
        <li>News you agreed to: until you tell us to stop. Then we keep only the note that you did.</li>
        <li>A gift form you did not finish: a short while, so that you can come back to it, then it goes.</li>
      </ul>
      <h2>Who else sees it</h2>
      <p>
        The card service, for the payment. The tax office, for Gift Aid. The company that carries our mail.
        Our examiner, who checks the books. One of the family, if you dedicate a gift and ask us to tell them:
        we tell them your name, unless you hide it from everybody, and never the sum unless you tick it. The
        people who build her, if you write them a message. Everybody, for the words you want on the wall.
        Nobody else. We do not sell, lend or swap names.
      </p>
    </>
  );
}

function Cookies() {
  return (
    <>
      <h2>Cookies</h2>
      <p>
        Reading this site sets none. The gift form sets one, so that your answers are still there after a slip
        or a lost connection. The desk sets one for the people who sign in there. Both are needed for what
        they do, and neither follows you anywhere. There are no advertisements, no counters and no other
        companies’ scripts on these pages.
      </p>
    </>
  );
}

export function PrivacyPage() {
  const society = useSociety();
  if (!society) return null;
  return (
    <main id="main" className="prose">
      <h1>Privacy</h1>
      <p className="lead">
        {society.name} keeps what it needs to take a gift, thank for it and account for it. This page says
        what that is.
      </p>
      <WhatWeKeep />
      <HowLong />
      <Cookies />
      <h2>What you can ask of us</h2>
      <p>
        Ask to see what we keep about you, to have it put right, to have it erased, or to have us stop using
        it. We answer within one month, and it costs nothing. What the law makes us keep, we keep, and we tell
        you what that is. Write or telephone:
      </p>
      <Contact society={society} />
      <p>
        If you are not content with how we treat what we know about you, tell us at the same address. We say
        within 30 days that we have your complaint, and tell you the outcome. You can also go to the
        Information Commissioner’s Office, at any time:{' '}
        <a href="https://ico.org.uk/make-a-complaint/">ico.org.uk</a>.
      </p>
    </main>
  );
}
