// Gives one gift as a giver does: sheet, checkout, card page, return. Only the waiting is left out.
import { z } from 'zod';
import type { GiveForm } from '#shared/giving/give-schemas.ts';
import { getAppealWording, getCampaign } from '#server/campaign/index.ts';
import type { Deps } from '#server/deps.ts';
import { beginCheckout, makeToken, readOutcome, writeDraft } from '#server/giving/index.ts';

const answerSchema = z.looseObject({});
const SESSION_IN_URL = /(cs_[A-Za-z0-9_]+)/;

/** The version that stands on the check page at this moment. */
async function currentAppealVersion(deps: Deps): Promise<number> {
  const campaign = await getCampaign(deps.db);
  return (await getAppealWording(deps.db, campaign.id, deps.clock.now())).version;
}

export type Controls = { post(path: string, body?: object): Promise<void> };

/** The controls of the payment stand-in; a refusal stops the generator with the stand-in's words. */
export const openControls = (url: string): Controls => ({
  async post(path, body = {}) {
    const answer = await fetch(`${url}${path}`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json' },
      body: JSON.stringify(body),
    });
    if (!answer.ok) throw new Error(`${path}: ${answer.status} ${await answer.text()}`);
    answerSchema.parse(await answer.json());
  },
});

export async function giveGift(
  deps: Deps,
  controls: Controls,
  answers: GiveForm,
  { comesBack }: { comesBack: boolean },
): Promise<void> {
  const token = makeToken();
  await writeDraft(deps, token, answers, false);
  const { url, intentId } = await beginCheckout(deps, {
    token,
    appealVersion: await currentAppealVersion(deps),
  });
  const sessionId = SESSION_IN_URL.exec(url)?.[1];
  if (!sessionId) throw new Error(`no session in ${url}`);
  await controls.post(`/sessions/${sessionId}/pay`);
  // Some close the window after paying; then only the webhook tells.
  if (comesBack) await readOutcome(deps, intentId);
}
