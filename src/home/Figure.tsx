// The elevation, inked by the state of each part; every part is a link to its own address.
import { useMemo, type FocusEvent } from 'react';
import { Link } from 'react-router-dom';
import type { Campaign, Part } from '#shared/campaign/campaign-schemas.ts';
import { GROUND_CUTS } from './ground-drawing.ts';
import { formatMetres, partLabel } from './part-words.ts';
import { splitDrawing, type DrawnPart } from './split-drawing.ts';
import { drawStaff } from './staff-drawing.ts';

export const partLinkId = (slug: string): string => `figure-${slug}`;

function Patterns() {
  return (
    <defs>
      <pattern id="hatch" width="4" height="4" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
        <path className="pat-paper" d="M0 0h4v4H0z" />
        <path className="pat-ink" d="M0 0h1.1v4H0z" />
      </pattern>
      <pattern
        id="cross"
        width="3.6"
        height="3.6"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <path className="pat-paper" d="M0 0h3.6v3.6H0z" />
        <path className="pat-ink" d="M0 0h1.3v3.6H0zM0 0h3.6v1.3H0z" />
      </pattern>
    </defs>
  );
}

function Staff({ heightMm }: { heightMm: number }) {
  const staff = useMemo(() => drawStaff(heightMm), [heightMm]);
  return (
    <g aria-hidden="true">
      <path className="staffpaper" d={staff.paper} />
      <path className="staffink" d={staff.ink} />
      {staff.metres.map(({ label, y }) => (
        <text key={label} className="stafftext" x="414" y={y} textAnchor="end">
          {label}
        </text>
      ))}
      <text className="stafftext" x="414" y={736 - heightMm / 10} textAnchor="end">
        {formatMetres(heightMm)} m
      </text>
    </g>
  );
}

type PartProps = {
  drawn: DrawnPart;
  part: Part;
  isShown: boolean;
  onFocusPart: (slug: string | null) => void;
};

function DrawnPartLink({ drawn, part, isShown, onFocusPart }: PartProps) {
  const label = partLabel(part);
  const showFocused = ({ currentTarget }: FocusEvent) => {
    // By keyboard the card follows the focus; by touch or pointer the link itself opens it.
    if (currentTarget.matches(':focus-visible')) onFocusPart(part.slug);
  };
  return (
    <Link
      id={partLinkId(part.slug)}
      to={`/parts/${part.slug}`}
      preventScrollReset
      aria-label={label}
      aria-current={isShown || undefined}
      onFocus={showFocused}
      onBlur={() => onFocusPart(null)}
    >
      <title>{label}</title>
      <g id={`part-${part.slug}`} className={`part is-${part.state}`}>
        {drawn.paths.map(({ kind, d }) => (
          <path key={`${kind} ${d}`} className={kind} d={d} />
        ))}
      </g>
    </Link>
  );
}

type Props = {
  campaign: Campaign;
  shownSlug: string | null;
  onFocusPart: (slug: string | null) => void;
};

export function Figure({ campaign, shownSlug, onFocusPart }: Props) {
  const { name, heightMm, parts, drawing } = campaign;
  const drawnParts = useMemo(() => splitDrawing(drawing), [drawing]);
  return (
    <svg
      className="fig"
      viewBox="0 0 540 760"
      role="group"
      aria-label={`${name}, drawn to scale, ${formatMetres(heightMm)} metres tall, beside a levelling staff`}
    >
      <Patterns />
      <path className="ground" d="M0 740H540" />
      <path className="groundcut" d={GROUND_CUTS} />
      <g transform="translate(14 0)">
        {drawnParts.map((drawn) => {
          const part = parts.find(({ slug }) => slug === drawn.slug);
          if (!part) return null;
          const isShown = shownSlug === part.slug;
          return (
            <DrawnPartLink
              key={part.slug}
              drawn={drawn}
              part={part}
              isShown={isShown}
              onFocusPart={onFocusPart}
            />
          );
        })}
      </g>
      <Staff heightMm={heightMm} />
    </svg>
  );
}
