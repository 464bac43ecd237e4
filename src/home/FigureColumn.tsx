// The figure beside her staff, the lamp line across both, and the card of the part that is open.
import { useEffect, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Campaign } from '#shared/campaign/campaign-schemas.ts';
import { formatPence } from '#shared/money.ts';
import { Swatch } from '#src/ui/Swatch.tsx';
import { Figure, partLinkId } from './Figure.tsx';
import { heightClass } from './height-class.ts';
import { PartCard } from './PartCard.tsx';
import { findPart, STATE_WORDS } from './part-words.ts';
import { reachSentence } from './reach-words.ts';
import { RungSums } from './RungSums.tsx';

/** Below this her arm and skirt take the right side: the sentence stands to the left of her. */
const SAY_LEFT_BELOW_MM = 4_600;
const KEY = ['placed', 'making', 'paid', 'planned'] as const;

/** Opening a part moves focus to its card, closing it back to the part, and Escape closes. */
function useCardFocus(openSlug: string | null) {
  const card = useRef<HTMLHeadingElement>(null);
  const shown = useRef(openSlug);
  const navigate = useNavigate();
  useEffect(() => {
    const before = shown.current;
    shown.current = openSlug;
    if (before === openSlug) return;
    if (openSlug !== null) card.current?.focus();
    else if (before !== null) document.getElementById(partLinkId(before))?.focus();
  }, [openSlug]);
  useEffect(() => {
    if (openSlug === null) return;
    const close = (event: KeyboardEvent) => {
      if (event.key === 'Escape') void navigate('/', { preventScrollReset: true });
    };
    document.addEventListener('keydown', close);
    return () => document.removeEventListener('keydown', close);
  }, [openSlug, navigate]);
  return card;
}

type Props = { campaign: Campaign; openSlug: string | null };

export function FigureColumn({ campaign, openSlug }: Props) {
  const [focused, setFocused] = useState<string | null>(null);
  const heading = useCardFocus(openSlug);
  const shown = findPart(campaign, focused ?? openSlug);
  const { reach, givenPence } = campaign;
  const height = heightClass(reach.heightMm);
  const isSaidLeft = reach.heightMm < SAY_LEFT_BELOW_MM;
  return (
    <div className={shown ? 'figure-col has-card' : 'figure-col'}>
      <div className="elevation">
        <div className="stand">
          <Figure campaign={campaign} shownSlug={shown?.slug ?? null} onFocusPart={setFocused} />
          <div className={`at reach-line ${height}`} />
          <p className={`at reach-say ${isSaidLeft ? 'left ' : ''}${height}`}>
            <b>{formatPence(givenPence)} given.</b> <span>{reachSentence(campaign)}</span>
          </p>
          <RungSums reach={reach} givenPence={givenPence} />
        </div>
        {shown && <PartCard campaign={campaign} part={shown} headingRef={heading} />}
      </div>
      <ul className="keyline" aria-label="How to read the figure">
        {KEY.map((kind) => (
          <li key={kind}>
            <Swatch kind={kind} />
            {STATE_WORDS[kind]}
          </li>
        ))}
        <li className="say">Touch any part.</li>
      </ul>
    </div>
  );
}
