// How long an answer is good, and what is worth asking again.
import { QueryClient } from '@tanstack/react-query';
import { ApiProblem } from './api.ts';

const STALE_MS = 60_000;
const MOST_RETRIES = 2;

/** A refusal stays a refusal; a lost connection or a fault over there may heal. */
export const isWorthRetrying = (failures: number, error: Error): boolean =>
  failures < MOST_RETRIES && !(error instanceof ApiProblem && error.problem.status < 500);

export const createQueryClient = ({ mayRetry }: { mayRetry: boolean }): QueryClient =>
  new QueryClient({
    defaultOptions: {
      queries: { staleTime: STALE_MS, retry: mayRetry ? isWorthRetrying : false },
      mutations: { retry: false },
    },
  });
