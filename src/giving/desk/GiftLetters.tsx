// The letters of a gift, each exactly as it went out, and the decision that a failed one asks for.
import type { GiftMail } from '#shared/giving/desk-schemas.ts';
import { useSettleLetter } from './gift-desk-queries.ts';
import { GiftLetter } from './GiftLetter.tsx';

export function GiftLetters({ mails }: { mails: readonly GiftMail[] }) {
  const settle = useSettleLetter();
  return (
    <section className="sec" aria-labelledby="letters">
      <h2 id="letters">Letters</h2>
      {mails.length === 0 && (
        <p className="ash">No letter was written for this gift. It is owed its thanks.</p>
      )}
      <ul className="owed">
        {mails.map((mail) => (
          <GiftLetter
            key={mail.id}
            mail={mail}
            isBusy={settle.isPending}
            onDecide={(decision) => settle.mutate({ mailId: mail.id, decision })}
          />
        ))}
      </ul>
      <p className="overdue" role="alert">
        {settle.isError && `This was not kept. ${settle.error.message}`}
      </p>
      <p className="vh" role="status">
        {settle.isSuccess &&
          (settle.variables.decision === 'send-again' ? 'It will be sent again.' : 'It is left as it is.')}
      </p>
    </section>
  );
}
