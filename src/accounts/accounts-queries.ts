// What the desk asks about who is signed in, and what it sends to prove and to change it.
import { queryOptions, useMutation, useQueryClient, type QueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import {
  accountSchema,
  recoveryCodesSchema,
  secondFactorKeptSchema,
  secondFactorOfferSchema,
  sessionSchema,
  type ChangePasswordForm,
  type Session,
  type SignInForm,
} from '#shared/accounts/session-schemas.ts';
import type { Api } from '#src/lib/api.ts';
import { SESSION_KEY } from '#src/lib/browser-api.ts';
import { useApi } from '#src/lib/use-api.ts';

const ACCOUNT_KEY = ['accounts', 'mine'] as const;

/** Asked again whenever the window comes back to the front: the session may have ended meanwhile. */
export const sessionQuery = (api: Api) =>
  queryOptions({
    queryKey: SESSION_KEY,
    queryFn: ({ signal }) => api.get(sessionSchema, '/api/session', signal),
  });

export const accountQuery = (api: Api) =>
  queryOptions({
    queryKey: ACCOUNT_KEY,
    queryFn: ({ signal }) => api.get(accountSchema, '/api/desk/account', signal),
  });

/** The next request must show the new token, so it is put in place before anything else is asked. */
async function keepSession(queryClient: QueryClient, session: Session): Promise<void> {
  await queryClient.cancelQueries({ queryKey: SESSION_KEY });
  queryClient.setQueryData<Session>(SESSION_KEY, session);
}

function useSend<Answer, Body>(
  schema: z.ZodType<Answer>,
  path: string,
  after: (queryClient: QueryClient, answer: Answer) => Promise<unknown>,
) {
  const api = useApi();
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (body: Body) => api.send(schema, path, { body }),
    onSuccess: (answer) => after(queryClient, answer),
  });
}

export const useSignIn = () => useSend<Session, SignInForm>(sessionSchema, '/api/session', keepSession);

export const useGiveCode = () =>
  useSend<Session, { code: string }>(
    sessionSchema,
    '/api/session/second-factor',
    async (queryClient, session) => {
      await keepSession(queryClient, session);
      // A recovery code may have been used up.
      await queryClient.invalidateQueries({ queryKey: ACCOUNT_KEY });
    },
  );

export const useBeginSecondFactor = () =>
  useSend<z.infer<typeof secondFactorOfferSchema>, { password?: string; code?: string }>(
    secondFactorOfferSchema,
    '/api/session/second-factor/setup',
    (queryClient, { session }) => keepSession(queryClient, session),
  );

export const useConfirmSecondFactor = () =>
  useSend<z.infer<typeof secondFactorKeptSchema>, { code: string }>(
    secondFactorKeptSchema,
    '/api/session/second-factor/setup/confirm',
    async (queryClient, { session }) => {
      await keepSession(queryClient, session);
      await queryClient.invalidateQueries({ queryKey: ACCOUNT_KEY });
    },
  );

export const useChangePassword = () =>
  useSend<Session, ChangePasswordForm>(sessionSchema, '/api/desk/account/password', keepSession);

export const useRenewRecoveryCodes = () =>
  useSend<z.infer<typeof recoveryCodesSchema>, { code: string }>(
    recoveryCodesSchema,
    '/api/desk/account/recovery-codes',
    (queryClient) => queryClient.invalidateQueries({ queryKey: ACCOUNT_KEY }),
  );

/** Leaves by loading the door anew: nothing that was read stays behind in the window. */
export function useLeaveDesk(doorPath: string) {
  const api = useApi();
  return useMutation({
    mutationFn: () => api.send(sessionSchema, '/api/session', { method: 'DELETE' }),
    onSuccess: () => window.location.assign(doorPath),
  });
}
