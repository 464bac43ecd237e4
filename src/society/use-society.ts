// The society's details for a page; the layout has loaded them already.
import { useQuery } from '@tanstack/react-query';
import type { Society } from '#shared/society/society-schemas.ts';
import { useApi } from '#src/lib/use-api.ts';
import { societyQuery } from './society-queries.ts';

export const useSociety = (): Society | undefined => useQuery(societyQuery(useApi())).data;
