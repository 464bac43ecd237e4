// Every answer of the sheet once more, each with the way to change it.
import type { GiveCheck } from '#shared/giving/give-schemas.ts';
import { formatPence } from '#shared/money.ts';
import { AnswerRow } from '#src/ui/AnswerRow.tsx';
import { addressLine, consentWords } from './give-words.ts';

const DEDICATIONS = {
  none: 'In memory or in honour',
  memory: 'In memory of',
  honour: 'In honour of',
} as const;

const NAMES_OFF = {
  'not-public': 'Your name stays off the wall and is not shown in public.',
  'treasurer-only': 'Your name stays off the wall and is hidden from everybody but the treasurer.',
} as const;

function DedicationAnswers({ answers }: { answers: GiveCheck['answers'] }) {
  const { dedication, dedicationName, contactName, contactEmail, contactSum, wall } = answers;
  if (dedication === 'none')
    return (
      <AnswerRow name={DEDICATIONS.none} changeTo="/give#dedication">
        Neither
      </AnswerRow>
    );
  return (
    <>
      <AnswerRow name={DEDICATIONS[dedication]} changeTo="/give#dedicationName">
        {dedicationName}
      </AnswerRow>
      <AnswerRow name="Whom we tell" changeTo="/give#contactName">
        {contactName
          ? [
              `${contactName}, ${contactEmail}.`,
              contactSum === 'on' ? 'With the sum.' : 'Without the sum.',
              wall === 'treasurer-only' ? 'Without your name.' : 'They are told your name.',
            ].join(' ')
          : 'Nobody'}
      </AnswerRow>
    </>
  );
}

function PersonAnswers({ answers }: { answers: GiveCheck['answers'] }) {
  return (
    <>
      <AnswerRow name="Name" changeTo="/give#name">
        {answers.name}
      </AnswerRow>
      <AnswerRow name="We greet you" changeTo="/give#greeting">
        Dear {answers.greeting || answers.name}
      </AnswerRow>
      <AnswerRow name="E-mail" changeTo="/give#email">
        {answers.email}
      </AnswerRow>
      <AnswerRow name="Address" changeTo="/give#address1">
        {addressLine(answers) || 'None given'}
      </AnswerRow>
      {answers.phone ? (
        <AnswerRow name="Telephone" changeTo="/give#phone">
          {answers.phone}
        </AnswerRow>
      ) : null}
    </>
  );
}

export function CheckAnswers({ check }: { check: GiveCheck }) {
  const { answers, towards, isDeclared, giftAidOffered } = check;
  return (
    <dl className="answers">
      <AnswerRow name="Gift" changeTo="/give#amount">
        {formatPence(check.sumPence)}, once
      </AnswerRow>
      <AnswerRow name="Towards" changeTo="/give#towards">
        {towards.name}
      </AnswerRow>
      <DedicationAnswers answers={answers} />
      <AnswerRow name="On the wall" changeTo="/give#wall">
        {answers.wall === 'wall' ? `“${answers.wallWords}”` : NAMES_OFF[answers.wall]}
      </AnswerRow>
      <AnswerRow name="Message" changeTo="/give#message">
        {answers.message ? <span className="as-written">{answers.message}</span> : 'None'}
      </AnswerRow>
      <PersonAnswers answers={answers} />
      {giftAidOffered === false ? null : (
        <AnswerRow name="Gift Aid" changeTo="/give#declare">
          {isDeclared
            ? 'Yes. I declare that I pay UK tax and will pay any difference myself.'
            : 'No. Nothing is claimed on this gift.'}
        </AnswerRow>
      )}
      <AnswerRow name="May we write" changeTo="/give#byEmail">
        {consentWords(answers)}
      </AnswerRow>
    </dl>
  );
}
