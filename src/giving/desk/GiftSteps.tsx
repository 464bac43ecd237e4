// Everything that happened to the gift, oldest first, each step in words with its time.
import { dayOf, formatDay, formatTime } from '#shared/dates.ts';
import type { GiftStep } from '#shared/giving/desk-schemas.ts';
import { HeadRow } from '#src/ui/HeadRow.tsx';

const KIND_NAMES: Record<GiftStep['kind'], string> = {
  seen: 'sheet',
  payment: 'card',
  gift: 'gift',
  books: 'books',
  words: 'words',
  mail: 'letter',
};
const HEADS = [{ label: 'When' }, { label: 'Where' }, { label: 'What' }];

const dayAt = (step: GiftStep | undefined): string | null => (step ? dayOf(new Date(step.at)) : null);

function StepRow({ step, isNewDay }: { step: GiftStep; isNewDay: boolean }) {
  const at = new Date(step.at);
  const day = formatDay(dayOf(at));
  return (
    <tr role="row" className={step.isFault ? 'fault' : undefined}>
      <th role="rowheader" scope="row" className="when">
        <time dateTime={step.at}>
          <span className={isNewDay ? 'd' : 'vh'}>{day}</span> <span className="t">{formatTime(at)}</span>
        </time>
      </th>
      <td role="cell" className="where">
        {KIND_NAMES[step.kind]}
      </td>
      <td role="cell" className="what">
        {step.words}
        {step.detail.map((line) => (
          <span key={line} className="fine">
            {line}
          </span>
        ))}
      </td>
    </tr>
  );
}

export function GiftSteps({ steps }: { steps: readonly GiftStep[] }) {
  return (
    <section className="sec" aria-labelledby="steps">
      <h2 id="steps">What happened</h2>
      <table role="table" className="ruled steps">
        <caption className="vh">Every step of this gift, oldest first</caption>
        <HeadRow heads={HEADS} />
        <tbody role="rowgroup">
          {steps.map((step, index) => (
            <StepRow
              // Steps of one moment may read alike; they never move, so their place names them.
              key={`${step.at}-${index}`}
              step={step}
              isNewDay={dayAt(step) !== dayAt(steps[index - 1])}
            />
          ))}
        </tbody>
      </table>
    </section>
  );
}
