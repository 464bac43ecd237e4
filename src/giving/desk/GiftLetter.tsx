// One letter: to whom, how it stands, and the plain part of what was sent, word for word.
import type { GiftMail, SettleMail } from '#shared/giving/desk-schemas.ts';
import { formatMoment } from '#shared/dates.ts';

type Props = { mail: GiftMail; isBusy: boolean; onDecide: (decision: SettleMail['decision']) => void };

const KINDS: Record<string, string> = {
  'gift-thanks': 'Thank-you',
  'dedication-told': 'Letter to the family',
};
const WAITS: Record<GiftMail['state'], string> = {
  queued: 'on its way',
  claimed: 'on its way',
  handing_over: 'being handed to the mail server',
  sent: 'sent',
  soft_failed: 'put off by the mail server, tried again by itself',
  hard_failed: 'came back',
  suppressed: 'not sent',
  uncertain: 'perhaps sent: the mail server did not answer',
};

function Standing({ mail }: { mail: GiftMail }) {
  if (mail.sentAt !== null)
    return (
      <>
        <span className="stamp wee done">Sent</span>{' '}
        <span className="small ash">{formatMoment(new Date(mail.sentAt))}</span>
      </>
    );
  return (
    <>
      <span className={mail.maySettle ? 'w due' : 'w'}>{WAITS[mail.state]}</span>
      {mail.settledBy && <span className="small ash">, left so by {mail.settledBy}</span>}
    </>
  );
}

function Decide({ name, mail, isBusy, onDecide }: Props & { name: string }) {
  return (
    <>
      {mail.state === 'uncertain' && (
        <p className="small">
          It may have arrived. Sent again, it keeps its number, so most mailboxes show it once.
        </p>
      )}
      <p className="acts">
        <button type="button" className="act first" disabled={isBusy} onClick={() => onDecide('send-again')}>
          Send again<span className="vh">: {name}</span>
        </button>
        <button type="button" className="act" disabled={isBusy} onClick={() => onDecide('leave')}>
          Leave it<span className="vh">: {name}</span>
        </button>
      </p>
    </>
  );
}

function Text({ name, mail }: { name: string; mail: GiftMail }) {
  if (mail.plain === null) return <p className="small ash">Its words are withheld with the name.</p>;
  return (
    <details className="letter">
      <summary>Read exactly what {mail.sentAt === null ? 'is to be sent' : 'was sent'}</summary>
      <p className="small ash">
        Subject: {mail.subject}
        <br />
        The key in the receipt’s address is the giver’s alone, so … stands for it here.
      </p>
      <pre tabIndex={0} role="region" aria-label={`${name}, its text`}>
        {mail.plain}
      </pre>
    </details>
  );
}

export function GiftLetter(props: Props) {
  const { mail } = props;
  const name = KINDS[mail.kind] ?? mail.kind;
  return (
    <li>
      <p>
        <b>{name}</b> to {mail.toName}
        {mail.toAddress && `, ${mail.toAddress}`}
      </p>
      <p>
        <Standing mail={mail} />
      </p>
      {mail.answer && <p className="small ash">The mail server said: {mail.answer}</p>}
      {mail.maySettle && <Decide {...props} name={name} />}
      <Text name={name} mail={mail} />
    </li>
  );
}
