// Says in the page's title that something needs putting right, while it does.
import { useEffect } from 'react';

export function useTroubleTitle(heading: string | undefined): void {
  useEffect(() => {
    if (heading === undefined) return;
    const title = document.title;
    if (title.startsWith(heading)) return;
    document.title = `${heading}${heading.endsWith('.') ? '' : '.'} ${title}`;
    return () => {
      // Another page has set its own title by now, or the trouble is over.
      if (document.title.startsWith(heading)) document.title = title;
    };
  }, [heading]);
}
