// Tells whether script runs here, so that what only script keeps true is not shown without it.
import { useSyncExternalStore } from 'react';

const never = () => () => undefined;

export const useHydrated = (): boolean =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
