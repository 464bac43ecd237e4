// Notices that the session has ended: any answer of 401, or the session itself when it is asked again.
import { useEffect } from 'react';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import type { Person, SessionStep } from '#shared/accounts/session-schemas.ts';
import { ApiProblem } from '#src/lib/api.ts';
import { SESSION_KEY } from '#src/lib/browser-api.ts';
import { useApi } from '#src/lib/use-api.ts';
import { sessionQuery } from './accounts-queries.ts';

const ENDED = new Set(['not-signed-in', 'second-factor-setup', 'stale-token']);

const hasEnded = (error: unknown): boolean =>
  error instanceof ApiProblem && (ENDED.has(error.problem.code) || ENDED.has(error.problem.reason ?? ''));

/** @returns the step at which the person stands again, or null while the desk is open to them. */
export function useRunOut(person: Person): Exclude<SessionStep, 'signed-in'> | null {
  const queryClient = useQueryClient();
  const session = useQuery(sessionQuery(useApi())).data;

  useEffect(() => {
    const ask = (error: unknown): void => {
      if (hasEnded(error)) void queryClient.invalidateQueries({ queryKey: SESSION_KEY });
    };
    const stopQueries = queryClient.getQueryCache().subscribe((event) => {
      if (event.type === 'updated' && event.action.type === 'error') ask(event.action.error);
    });
    const stopMutations = queryClient.getMutationCache().subscribe((event) => {
      if (event.type === 'updated' && event.action.type === 'error') ask(event.action.error);
    });
    return () => {
      stopQueries();
      stopMutations();
    };
  }, [queryClient]);

  const email = session?.person?.email;
  useEffect(() => {
    if (email === undefined) return;
    // Somebody else has taken the chair: what the window still holds was not meant for them.
    if (email !== person.email) window.location.reload();
  }, [email, person.email]);

  const step = session?.step;
  useEffect(() => {
    // What was refused meanwhile is asked again.
    if (step === 'signed-in')
      void queryClient.invalidateQueries({ predicate: ({ state }) => state.status === 'error' });
  }, [step, queryClient]);

  return session === undefined || session.step === 'signed-in' ? null : session.step;
}
