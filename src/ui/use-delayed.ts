// Tells when something has gone on for a while, so that what is quick never flickers.
import { useEffect, useState } from 'react';

export const SKELETON_AFTER_MS = 300;

export function useDelayed(isGoingOn: boolean, delayMs = SKELETON_AFTER_MS): boolean {
  const [isLong, setLong] = useState(false);
  useEffect(() => {
    if (!isGoingOn) return;
    const timer = setTimeout(() => setLong(true), delayMs);
    return () => {
      clearTimeout(timer);
      setLong(false);
    };
  }, [isGoingOn, delayMs]);
  return isLong && isGoingOn;
}
