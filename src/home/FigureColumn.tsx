// The figure beside her staff, the lamp line across both, and the card of the part that is open.
import { useEffect, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Campaign } from '#shared/campaign/campaign-schemas.ts';
import { formatPence } from '#shared/money.ts';
import { Swatch } from '#src/ui/Swatch.tsx';
import { Figure, partLinkId } from './Figure.tsx';
import { heightClass } from './height-class.ts';
import { PartCard } from './PartCard.tsx';
import { findPart, middleMm, STATE_WORDS } from './part-words.ts';
import { reachSentence } from './reach-words.ts';
import { RungSums } from './RungSums.tsx';

/** Below this her arm and skirt take the right side: the sentence stands to the left of her. */
const SAY_LEFT_BELOW_MM = 4_600;
/** Above this there is no room over the line: the sentence hangs below it. */
const SAY_UNDER_ABOVE_MM = 6_600;
/** A card whose part is nearer to the line than this would cut the sentence. */
const CARD_NEAR_MM = 2_200;
const KEY = ['placed', 'making', 'paid', 'planned'] as const;

function sayPlace(heightMm: number): 'left' | 'under' | 'over' {
  if (heightMm < SAY_LEFT_BELOW_MM) return 'left';
  return heightMm > SAY_UNDER_ABOVE_MM ? 'under' : 'over';
}

/** Opening a part moves focus to its card, closing it back to the part, and Escape closes. */
function useCard(openSlug: string | null) {
  const [previewed, setPreviewed] = useState<string | null>(null);
  const heading = useRef<HTMLHeadingElement>(null);
  const before = useRef(openSlug);
  const isReturning = useRef(false);
  const navigate = useNavigate();
  useEffect(() => {
    const left = before.current;
    before.current = openSlug;
    if (left === openSlug) return;
    if (openSlug !== null) return heading.current?.focus();
    if (left === null) return;
    // The part has the focus again, but its card was closed on purpose.
    isReturning.current = true;
    document.getElementById(partLinkId(left))?.focus();
    isReturning.current = false;
  }, [openSlug]);
  useEffect(() => {
    if (openSlug === null && previewed === null) return;
    const close = ({ key }: KeyboardEvent) => {
      if (key !== 'Escape') return;
      setPreviewed(null);
      if (openSlug !== null) void navigate('/', { preventScrollReset: true });
    };
    document.addEventListener('keydown', close);
    return () => document.removeEventListener('keydown', close);
  }, [openSlug, previewed, navigate]);
  const preview = (slug: string | null) => {
    if (!isReturning.current) setPreviewed(slug);
  };
  return { heading, shownSlug: previewed ?? openSlug, preview };
}

type Props = { campaign: Campaign; openSlug: string | null };

export function FigureColumn({ campaign, openSlug }: Props) {
  const { heading, shownSlug, preview } = useCard(openSlug);
  const shown = findPart(campaign, shownSlug);
  const { reach, givenPence } = campaign;
  const height = heightClass(reach.heightMm);
  const isNear = shown !== undefined && Math.abs(middleMm(shown) - reach.heightMm) < CARD_NEAR_MM;
  return (
    <div className={isNear ? 'figure-col card-near' : 'figure-col'}>
      <div className="elevation">
        <div className="stand">
          <Figure campaign={campaign} shownSlug={shown?.slug ?? null} onFocusPart={preview} />
          <div className={`at reach-line ${height}`} />
          <p className={`at reach-say ${sayPlace(reach.heightMm)} ${height}`}>
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
