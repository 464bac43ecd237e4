// The one sheet on which a gift is made.
import { inSentence } from '#shared/campaign/name-rules.ts';
import { useEffect } from 'react';
import { useActionData, useLoaderData, useLocation } from 'react-router-dom';
import { ErrorSummary, faultsHeading } from '#src/ui/ErrorSummary.tsx';
import { goToAnswer } from '#src/ui/go-to-answer.ts';
import { SendButton } from '#src/ui/SendButton.tsx';
import { Trouble } from '#src/ui/Trouble.tsx';
import { AmountRow } from './AmountRow.tsx';
import { ConsentRow } from './ConsentRow.tsx';
import { DedicationRow } from './DedicationRow.tsx';
import { DetailsRow } from './DetailsRow.tsx';
import { GiftAidRow } from './GiftAidRow.tsx';
import type { PressTrouble, SheetTrouble } from './give-actions.ts';
import type { GivePageData } from './give-loaders.ts';
import { GIVE_LABELS } from './give-words.ts';
import { TowardsRow } from './TowardsRow.tsx';
import { SHEET_ID, useGiveForm, type SheetControls } from './use-give-form.ts';
import { useTroubleTitle } from './use-trouble-title.ts';
import { WallRow } from './WallRow.tsx';

// Whoever has just paid and steps back comes here too, so that it must not say that nothing was taken.
const LOST_SHEET =
  'There is nothing here to check. If you have just given, that sheet is done with, and your receipt comes by e-mail. If you had not paid yet, your answers could not be found: cookies are switched off, or a long time went by. Please fill in the sheet here.';

/** Words that once came with the address must not overwrite, on the way back, what was written since. */
function usePlainAddress() {
  const { hash, search } = useLocation();
  useEffect(() => {
    if (search !== '') window.history.replaceState(window.history.state, '', `/give${hash}`);
    if (hash !== '') goToAnswer(hash.slice(1));
  }, [hash, search]);
}

type TroubleProps = { controls: SheetControls; trouble: PressTrouble | undefined; isWorking: boolean };

function WhatIsWrong({ controls, trouble, isWorking }: TroubleProps) {
  if (trouble)
    return (
      <Trouble heading={trouble.heading}>
        {trouble.detail ? <p>{trouble.detail}</p> : null}
        <SendButton form={SHEET_ID} isPlain isWorking={isWorking} workingWords="Trying again …">
          Try again
        </SendButton>
      </Trouble>
    );
  return Object.keys(controls.faults).length > 0 ? (
    <ErrorSummary faults={controls.faults} labels={GIVE_LABELS} />
  ) : null;
}

export function GivePage() {
  const loaded = useLoaderData<GivePageData>();
  const { sheet, isLostSheet } = loaded;
  const { controls, trouble, isWorking, press } = useGiveForm(loaded, useActionData<SheetTrouble>());
  const faultCount = Object.keys(controls.faults).length;
  usePlainAddress();
  useTroubleTitle(trouble?.heading ?? (faultCount > 0 ? faultsHeading(faultCount) : undefined));
  const numbers = sheet.giftAid ? { consent: 7 } : { consent: 6 };
  return (
    <main id="main" className="page">
      <h1>Give to {inSentence(sheet.campaignName)}</h1>
      <p className="lead">One sheet, about two minutes. You see everything once more before you pay.</p>
      <WhatIsWrong {...{ controls, trouble, isWorking }} />
      {isLostSheet ? (
        <p className="told" role="status">
          {LOST_SHEET}
        </p>
      ) : null}
      <form
        id={SHEET_ID}
        className="sheet"
        method="post"
        action="/give"
        noValidate
        onSubmit={(event) => void press(event)}
      >
        <input
          type="hidden"
          {...controls.form.register('shownWordings')}
          defaultValue={sheet.answers.shownWordings}
        />
        <AmountRow controls={controls} note={sheet.whatSumsBuy} number={1} />
        <TowardsRow controls={controls} sheet={sheet} number={2} />
        <DedicationRow controls={controls} number={3} />
        <WallRow controls={controls} number={4} />
        <DetailsRow controls={controls} number={5} isGiftAidOffered={sheet.giftAid !== null} />
        {sheet.giftAid ? (
          <GiftAidRow controls={controls} sheet={sheet} giftAid={sheet.giftAid} number={6} />
        ) : null}
        <ConsentRow controls={controls} wording={sheet.consentWording} number={numbers.consent} />
        <div className="end">
          <SendButton isWorking={isWorking} workingWords="Checking …">
            Check before you pay
          </SendButton>
          <p className="small sans ash">
            Nothing is taken yet. The next page shows every answer and the total.
          </p>
        </div>
      </form>
    </main>
  );
}
