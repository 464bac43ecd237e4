// Gives components the Api that their page was opened with.
import { createContext, useContext } from 'react';
import type { Api } from './api.ts';

export const ApiContext = createContext<Api | null>(null);

export function useApi(): Api {
  const api = useContext(ApiContext);
  if (!api) throw new Error('useApi stands outside of the site');
  return api;
}
