// When things happen: each stage with its day, and where a day was changed, the old one struck out and why.
import { Fragment } from 'react';
import type { Stage } from '#shared/campaign/campaign-schemas.ts';
import { DateText } from '#src/ui/DateText.tsx';
import { Stamp, type StampTone } from '#src/ui/Stamp.tsx';
import { StageMark } from './StageMark.tsx';

function stampOf({ doneOn, changes }: Stage): { tone: StampTone; word: string } {
  if (doneOn !== null) return { tone: 'done', word: 'Done' };
  return changes.length > 0 ? { tone: 'late', word: 'Changed' } : { tone: 'wait', word: 'Expected' };
}

const whenWord = (isChanged: boolean, isDone: boolean): string =>
  isChanged ? (isDone ? 'Then expected' : 'Now expected') : 'Expected';

/** What is remarked on a stage that came late is a reason, like that of a changed day. */
const isLate = ({ doneOn, expectedOn }: Stage): boolean => doneOn !== null && doneOn > expectedOn;

function Days({ stage }: { stage: Stage }) {
  const { expectedOn, doneOn, changes, remark } = stage;
  return (
    <p>
      {changes.map(({ fromDay, toDay }) => (
        <Fragment key={`${fromDay} ${toDay}`}>
          <del>
            <span className="visually-hidden">It was </span>
            <DateText day={fromDay} />
          </del>{' '}
        </Fragment>
      ))}
      {whenWord(changes.length > 0, doneOn !== null)} <DateText day={expectedOn} />.
      {doneOn !== null && (
        <>
          {' '}
          Done <DateText day={doneOn} />.
        </>
      )}
      {remark !== null && !isLate(stage) && ` ${remark}`}
    </p>
  );
}

function Reasons({ stage }: { stage: Stage }) {
  return (
    <>
      {stage.changes.map(({ fromDay, toDay, reason }) => (
        <p key={`${fromDay} ${toDay}`} className="why">
          {reason}
        </p>
      ))}
      {stage.remark !== null && isLate(stage) && <p className="why">{stage.remark}</p>}
    </>
  );
}

export function Stages({ stages }: { stages: readonly Stage[] }) {
  return (
    <ol className="stages">
      {stages.map((stage) => {
        const { tone, word } = stampOf(stage);
        return (
          <li key={stage.slug}>
            <StageMark mark={stage.mark} />
            <div className="stage-words">
              <h3>{stage.name}</h3>
              <Days stage={stage} />
              <Reasons stage={stage} />
            </div>
            <div className="stage-stamp">
              <Stamp tone={tone}>{word}</Stamp>
            </div>
          </li>
        );
      })}
    </ol>
  );
}
