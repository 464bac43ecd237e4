// What every route of the site is made from.
import type { QueryClient } from '@tanstack/react-query';
import type { Api } from './api.ts';

export type RouteContext = { queryClient: QueryClient; api: Api };
