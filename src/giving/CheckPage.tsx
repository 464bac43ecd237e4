// Check before you pay: every answer, the total, and what becomes of the gift. Nothing is taken here.
import { useEffect } from 'react';
import { Form, Link, useActionData, useLoaderData, useNavigation } from 'react-router-dom';
import type { GiveCheck } from '#shared/giving/give-schemas.ts';
import { add, formatPence } from '#shared/money.ts';
import { SendButton } from '#src/ui/SendButton.tsx';
import { Sums, type SumLine } from '#src/ui/Sums.tsx';
import { Trouble } from '#src/ui/Trouble.tsx';
import { CheckAnswers } from './CheckAnswers.tsx';
import type { PressTrouble } from './give-actions.ts';
import type { CheckPageData } from './give-loaders.ts';
import { inSentence } from '#shared/campaign/name-rules.ts';
import { useTroubleTitle } from './use-trouble-title.ts';

const CHECK_ID = 'give-check';

function sumLines({ sumPence, giftAidPence, isDeclared, pronoun, campaignName }: GiveCheck): SumLine[] {
  const total = { words: 'You pay today', sumPence, isTotal: true };
  if (!isDeclared) return [total];
  return [
    total,
    { words: `Gift Aid for ${pronoun}`, sumPence: giftAidPence },
    { words: `Worth to ${inSentence(campaignName)}`, sumPence: add(sumPence, giftAidPence) },
  ];
}

function TotalBox({ check }: { check: GiveCheck }) {
  const { towards, onShortfall, onSurplus, saidBack } = check;
  return (
    <div className="total-box">
      <h2>The total</h2>
      <div>
        {saidBack.map((words) => (
          <p className="told" key={words}>
            {words}
          </p>
        ))}
        <Sums caption="What you pay and what it is worth" lines={sumLines(check)} />
      </div>
      <div className="note">
        <p>
          Your receipt comes by e-mail.
          {towards.slug !== null &&
            ` ${towards.name}: ${formatPence(towards.stillNeededPence)} needed before your gift.`}
        </p>
        <p>{onShortfall}</p>
        <p>{onSurplus}</p>
      </div>
    </div>
  );
}

function WhatIsWrong({ trouble, isWorking }: { trouble: PressTrouble; isWorking: boolean }) {
  return (
    <Trouble heading={trouble.heading}>
      {trouble.detail ? <p>{trouble.detail}</p> : null}
      {trouble.changeTo ? (
        <p>
          <Link to={trouble.changeTo}>Choose again where your gift goes</Link>
        </p>
      ) : (
        <SendButton form={CHECK_ID} isPlain isWorking={isWorking} workingWords="Trying again …">
          Try again
        </SendButton>
      )}
    </Trouble>
  );
}

/** Back from the card page the browser may show this page as it was left, with the button still at work. */
function useFreshAfterReturn() {
  useEffect(() => {
    const reload = (event: PageTransitionEvent) => {
      if (event.persisted) window.location.reload();
    };
    window.addEventListener('pageshow', reload);
    return () => window.removeEventListener('pageshow', reload);
  }, []);
}

export function CheckPage() {
  const { check, isReturned, trouble: troubleBefore } = useLoaderData<CheckPageData>();
  const trouble = useActionData<PressTrouble>() ?? troubleBefore;
  const isWorking = useNavigation().formAction !== undefined;
  useTroubleTitle(trouble?.heading);
  useFreshAfterReturn();
  const sum = formatPence(check.sumPence);
  return (
    <main id="main" className="page check">
      <h1>Check before you pay</h1>
      <p className="lead">
        {isReturned
          ? 'You came back without paying. Nothing has been taken, and every answer is still here.'
          : 'Nothing has been taken yet.'}
      </p>
      {trouble ? <WhatIsWrong trouble={trouble} isWorking={isWorking} /> : null}
      <Form
        id={CHECK_ID}
        className="sheet"
        method="post"
        action="/give/check"
        onSubmit={(event) => {
          if (isWorking) event.preventDefault();
        }}
      >
        <input type="hidden" name="appealVersion" value={check.appealVersion} />
        <CheckAnswers check={check} />
        <TotalBox check={check} />
        <div className="end">
          <SendButton isWorking={isWorking} workingWords="Opening the card page …">
            Pay {sum}
          </SendButton>
          <p className="small sans ash">
            You pay on our card service’s page and come back here. We never see your card number.
          </p>
        </div>
      </Form>
    </main>
  );
}
