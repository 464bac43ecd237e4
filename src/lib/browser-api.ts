// The Api as the browser asks it: fetch on our own address, with the session's token where there is one.
import type { QueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { TOKEN_HEADER } from '#shared/accounts/token-header.ts';
import { NoAnswer, type Api } from './api.ts';
import { createApi, type Exchange } from './create-api.ts';

/** The query under which the session stands; its answer carries the token that changes must show. */
export const SESSION_KEY = ['session'] as const;
const tokenSchema = z.object({ token: z.string() });

function tokenHeader(queryClient: QueryClient): Record<string, string> {
  const session = tokenSchema.safeParse(queryClient.getQueryData(SESSION_KEY));
  return session.success ? { [TOKEN_HEADER]: session.data.token } : {};
}

export function createBrowserApi(queryClient: QueryClient): Api {
  const exchange: Exchange = async ({ method, path, body, signal }) => {
    const hasBody = body !== undefined;
    try {
      const response = await fetch(path, {
        method,
        credentials: 'same-origin',
        headers: {
          Accept: 'application/json',
          ...(hasBody && { 'Content-Type': 'application/json' }),
          ...(method !== 'GET' && tokenHeader(queryClient)),
        },
        ...(hasBody && { body: JSON.stringify(body) }),
        ...(signal && { signal }),
      });
      return { status: response.status, text: await response.text() };
    } catch (error) {
      if (signal?.aborted) throw error;
      throw new NoAnswer('No answer came. Look to your connection and try again.');
    }
  };
  return createApi(exchange);
}
