// The sheet as it is filled in: what was typed is kept first, right or wrong, and judged afterwards.
import { giveRequestSchema, keptAnswers, type GiveFormFilled } from '#shared/giving/give-schemas.ts';
import { isFull } from '#shared/campaign/reach-rules.ts';
import { fieldFaults, type FieldFaults } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { Invalid } from '#server/platform/errors.ts';
import { getGivingSettings, getWording, isGiftAidOffered, type Wording } from '#server/society/index.ts';
import { keepDraft } from './draft-store.ts';
import { readStanding, type Standing } from './standing.ts';

type Rules = {
  standing: Standing;
  leastPence: Parameters<typeof giveRequestSchema>[0]['leastPence'];
  isGiftAidOffered: boolean;
  declaration: Wording;
  consent: Wording;
};

/** How a sheet says which words stood on it. */
export const shownWordings = ({ declaration, consent }: Pick<Rules, 'declaration' | 'consent'>): string =>
  `${declaration.version}.${consent.version}`;

export async function readRules(deps: Deps): Promise<Rules> {
  const now = deps.clock.now();
  const [standing, settings, offered, declaration, consent] = await Promise.all([
    readStanding(deps.db),
    getGivingSettings(deps.db, now),
    isGiftAidOffered(deps.db, now),
    getWording(deps.db, 'declaration', now),
    getWording(deps.db, 'consent', now),
  ]);
  return { standing, leastPence: settings.leastGiftPence, isGiftAidOffered: offered, declaration, consent };
}

/** Whether anything was agreed to whose words matter afterwards. */
const relies = ({ declare, byEmail, byPost, byPhone }: GiveFormFilled): boolean =>
  [declare, byEmail, byPost, byPhone].includes('on');

/** Every fault of the answers, or the answers checked; pure but for the rules it is given. */
export function judgeAnswers(
  body: unknown,
  rules: Rules,
): { answers: GiveFormFilled; faults?: never } | { faults: FieldFaults; answers?: never } {
  const parsed = giveRequestSchema({ leastPence: rules.leastPence }).safeParse(body);
  if (!parsed.success) return { faults: fieldFaults(parsed.error) };
  const faults: FieldFaults = {};
  const { towards, declare } = parsed.data;
  if (towards !== 'whole') {
    const part = rules.standing.parts.find((one) => one.slug === towards && one.topMm !== null);
    if (!part) faults.towards = 'Choose the whole figure or one of the parts listed.';
    else if (isFull(rules.standing.reach, towards))
      faults.towards = `${part.name} is paid for now. Choose another part, or the whole figure.`;
  }
  if (declare === 'on' && !rules.isGiftAidOffered)
    faults.declare = 'We cannot claim Gift Aid yet. Leave the box unticked.';
  if (relies(parsed.data) && parsed.data.shownWordings !== shownWordings(rules))
    faults.declare ??=
      'The words you agree to have changed since this page was opened. Load the page again and read them; your answers are kept.';
  return Object.keys(faults).length > 0 ? { faults } : { answers: parsed.data };
}

/**
 * Keeps what was typed and judges it, unless the giver only stepped away (`isQuiet`).
 * @throws Invalid naming every wrong field; what was typed is kept all the same.
 */
export async function writeDraft(deps: Deps, token: string, body: unknown, isQuiet: boolean): Promise<void> {
  const verdict = isQuiet ? undefined : judgeAnswers(body, await readRules(deps));
  await deps.db.transaction((trx) =>
    keepDraft(trx, token, {
      answers: keptAnswers(body),
      isComplete: verdict?.answers !== undefined,
      at: deps.clock.now(),
    }),
  );
  if (verdict?.faults) throw new Invalid(verdict.faults);
}
