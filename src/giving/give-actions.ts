// What pressing a button of the giving pages does, the same on the server and in the browser.
import type { QueryClient } from '@tanstack/react-query';
import { data, redirect, redirectDocument } from 'react-router-dom';
import type { FieldFaults } from '#shared/errors.ts';
import type { GiveAnswers } from '#shared/giving/give-schemas.ts';
import { ApiProblem, NoAnswer } from '#src/lib/api.ts';
import type { RouteContext } from '#src/lib/route-context.ts';
import { readForm } from './give-form-data.ts';
import { saveDraft, startCheckout } from './give-queries.ts';

/** Why a press did not go through. `isLost`: no answer came, so nothing is known but that nothing was paid. */
export type PressTrouble = { heading: string; detail?: string; isLost?: boolean; changeTo?: string };
export type SheetTrouble = { fields: FieldFaults; answers: GiveAnswers; trouble?: PressTrouble };

const SEE_OTHER = 303;
const LOST: PressTrouble = {
  heading: 'Your connection is lost. Nothing was taken and everything you wrote is still here.',
  isLost: true,
};
const OUR_FAULT: PressTrouble = {
  heading: 'Something went wrong here. Nothing was taken and everything you wrote is still here.',
  detail: 'The fault is ours, not yours. Try again in a minute.',
};
export const START_AGAIN = '/give?again=1';
/** The sheet with every fault of the kept draft named. */
export const UNFINISHED = '/give?unfinished=1';

/**
 * A page that answers a posted form cannot be gone back to: it is never kept, so the browser would have to post
 * again. Without script the trouble is therefore told by the page to which the press leads.
 */
const isOnServer = typeof document === 'undefined';

const TITLE_KEY = ['giving', 'title-of-trouble'] as const;

/** The page is loaded after the press: what went wrong is handed on for its title, once. */
export function takeTroubleTitle(queryClient: QueryClient): string | undefined {
  const heading = queryClient.getQueryData<string>(TITLE_KEY);
  queryClient.removeQueries({ queryKey: TITLE_KEY });
  return heading;
}

function troubleOf(error: unknown): { trouble: PressTrouble; status: number } {
  if (error instanceof NoAnswer) return { trouble: LOST, status: 503 };
  if (!(error instanceof ApiProblem)) throw error;
  const { status, title, detail } = error.problem;
  if (status < 500 || status === 502) return { trouble: { heading: detail ?? title }, status };
  return { trouble: OUR_FAULT, status };
}

export async function pressCheck({ api, queryClient }: RouteContext, request: Request) {
  const answers = readForm(await request.formData());
  try {
    await saveDraft(api, answers);
    return redirect('/give/check', SEE_OTHER);
  } catch (error) {
    if (error instanceof ApiProblem && error.problem.fields) {
      const { fields } = error.problem;
      if (isOnServer) return redirect(UNFINISHED, SEE_OTHER);
      return data<SheetTrouble>({ fields, answers }, { status: 400 });
    }
    const { trouble, status } = troubleOf(error);
    queryClient.setQueryData(TITLE_KEY, trouble.heading);
    return data<SheetTrouble>({ fields: {}, answers, trouble }, { status });
  }
}

/** Where to go when there is nothing complete to check; undefined when the trouble is another. */
export function backToSheet(error: unknown): string | undefined {
  if (!(error instanceof ApiProblem)) return undefined;
  const { reason, status } = error.problem;
  if (reason === 'incomplete') return UNFINISHED;
  return reason === 'no-draft' || status === 404 ? START_AGAIN : undefined;
}

const STATUS_TROUBLES: Record<number, string> = { 429: 'too-many', 502: 'away' };
const payTroublePath = (error: unknown, status: number) => {
  const reason = error instanceof ApiProblem ? (error.problem.reason ?? '') : '';
  return `/give/check?trouble=${reason in PAY_TROUBLES ? reason : (STATUS_TROUBLES[status] ?? 'fault')}`;
};
const PAY_TROUBLES: Record<string, PressTrouble> = {
  'wording-changed': {
    heading: 'The words of the appeal have changed since you saw them. Please look once more.',
  },
  'still-confirming': {
    heading:
      'Your bank has not yet confirmed the gift you made a moment ago. Please do not pay a second time.',
  },
  'already-paid': {
    heading: 'This gift is paid already, and the receipt is on its way. Nothing more was taken.',
  },
  'too-many': { heading: 'Too many tries came from here. Nothing was taken. Wait a little and try again.' },
  away: { heading: 'The card service did not answer. Nothing was taken. Try again in a minute.' },
  fault: OUR_FAULT,
};
/** What went wrong with the press that led here, when one did. */
export const payTroubleOf = (search: URLSearchParams): PressTrouble | undefined =>
  PAY_TROUBLES[search.get('trouble') ?? ''];

export async function pressPay({ api }: RouteContext, request: Request) {
  const form = await request.formData();
  try {
    const { url } = await startCheckout(api, Number(form.get('appealVersion')));
    return redirectDocument(url, SEE_OTHER);
  } catch (error) {
    const sheet = backToSheet(error);
    if (sheet !== undefined) return redirect(sheet, SEE_OTHER);
    const { trouble, status } = troubleOf(error);
    const isFull = error instanceof ApiProblem && error.problem.reason === 'part-full';
    if (isOnServer) return redirect(isFull ? UNFINISHED : payTroublePath(error, status), SEE_OTHER);
    return data<PressTrouble>({ ...trouble, ...(isFull && { changeTo: '/give#towards' }) }, { status });
  }
}
