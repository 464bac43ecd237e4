// What the money given builds, said in one sentence.
import type { Campaign } from '#shared/campaign/campaign-schemas.ts';
import { findPart, formatMetres, inSentence } from './part-words.ts';

const SUBJECTS: Record<string, string> = { her: 'She', him: 'He', it: 'It', them: 'They' };

const subjectOf = (pronoun: string): string => SUBJECTS[pronoun] ?? 'It';
const isMany = (pronoun: string): boolean => pronoun === 'them';

export const standsToday = (pronoun: string): string =>
  `As ${subjectOf(pronoun).toLowerCase()} ${isMany(pronoun) ? 'stand' : 'stands'} today`;

type ReachOf = Pick<Campaign, 'pronoun' | 'heightMm' | 'parts'> & {
  reach: Pick<Campaign['reach'], 'heightMm' | 'part' | 'rungs'>;
};

/** A part that is named by where it ends, such as "Raised arm to the elbow", gives the better word. */
const endOf = (name: string): string | undefined => /\bto (the .+)$/i.exec(name)?.[1];

export function reachSentence(campaign: ReachOf): string {
  const { pronoun, heightMm, reach } = campaign;
  if (reach.part === null)
    return `${subjectOf(pronoun)} ${isMany(pronoun) ? 'are' : 'is'} paid for, all ${formatMetres(heightMm)} metres.`;
  const whole = reach.rungs.filter((rung) => rung.topMm <= reach.heightMm).at(-1);
  if (!whole) {
    const first = campaign.parts.find((part) => part.slug === reach.part);
    return first ? `It begins on ${inSentence(first.name)}.` : 'Nothing is paid for yet.';
  }
  const end = endOf(whole.name);
  if (end) return `It builds ${pronoun} to ${end}.`;
  const isExact = whole.topMm === reach.heightMm;
  return `It builds ${pronoun} ${isExact ? 'to the top of' : 'past'} ${inSentence(whole.name)}.`;
}

/** The part that is being paid for now. */
export const nextPart = (campaign: Campaign) => findPart(campaign, campaign.reach.part);
