// What the server hands to the browser beside the drawn page, so that nothing is asked twice.
import type { DehydratedState } from '@tanstack/react-query';
import type { HydrationState } from 'react-router-dom';
import { z } from 'zod';

const isObject = (value: unknown): boolean => typeof value === 'object' && value !== null;

/** Ours from end to end, and read by the libraries that wrote it: only its outer shape is checked. */
const pageStateSchema = z.object({
  router: z.custom<HydrationState>(isObject),
  query: z.custom<DehydratedState>(isObject),
});
export type PageState = z.infer<typeof pageStateSchema>;

/** The escapes keep a `</script>` inside a text from ending the element that holds it. */
export const writePageState = (state: PageState): string =>
  JSON.stringify(state)
    .replaceAll('<', '\\u003c')
    .replaceAll('\u2028', '\\u2028')
    .replaceAll('\u2029', '\\u2029');

/** Null where the page is the empty shell that the browser draws itself. */
export function readPageState(text: string | null | undefined): PageState | null {
  if (!text?.startsWith('{')) return null;
  return pageStateSchema.parse(JSON.parse(text));
}
