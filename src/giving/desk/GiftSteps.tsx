// Everything that happened to the gift, oldest first, each step in words with its time.
import { dayOf, formatDay, formatTime } from '#shared/dates.ts';
import type { GiftStep } from '#shared/giving/desk-schemas.ts';

const KIND_NAMES: Record<GiftStep['kind'], string> = {
  seen: 'sheet',
  payment: 'card',
  gift: 'gift',
  books: 'books',
  words: 'words',
  mail: 'letter',
};

export function GiftSteps({ steps }: { steps: readonly GiftStep[] }) {
  return (
    <section className="sec" aria-labelledby="steps">
      <h2 id="steps">What happened</h2>
      <table role="table" className="ruled steps">
        <caption className="vh">Every step of this gift, oldest first</caption>
        <thead role="rowgroup">
          <tr role="row">
            <th role="columnheader" scope="col">
              When
            </th>
            <th role="columnheader" scope="col">
              Where
            </th>
            <th role="columnheader" scope="col">
              What
            </th>
          </tr>
        </thead>
        <tbody role="rowgroup">
          {steps.map((step, index) => {
            const at = new Date(step.at);
            const day = dayOf(at);
            const before = steps[index - 1];
            const isNewDay = !before || dayOf(new Date(before.at)) !== day;
            return (
              <tr role="row" key={`${step.at}-${index}`} className={step.isFault ? 'fault' : undefined}>
                <th role="rowheader" scope="row" className="when">
                  <time dateTime={step.at}>
                    {isNewDay ? (
                      <span className="d">{formatDay(day)}</span>
                    ) : (
                      <span className="vh">{formatDay(day)}, </span>
                    )}
                    <span className="t">{formatTime(at)}</span>
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
          })}
        </tbody>
      </table>
    </section>
  );
}
