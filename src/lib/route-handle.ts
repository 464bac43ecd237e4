// What a route may say about itself in `handle`, and the title that follows from it.
import { z } from 'zod';

export type RouteHandle = {
  title?: string;
  /** Routes of one place are one page: going between them moves neither focus nor scroll. */
  place?: string;
};

const handleSchema = z.object({ title: z.string().optional(), place: z.string().optional() });
const titledSchema = z.object({ title: z.string() });

export type TitledMatch = { handle: unknown; loaderData: unknown };

export const readHandle = (handle: unknown): RouteHandle => {
  const parsed = handleSchema.safeParse(handle);
  if (!parsed.success) return {};
  const { title, place } = parsed.data;
  return { ...(title !== undefined && { title }), ...(place !== undefined && { place }) };
};

/** The deepest route that names the page wins; its loader's `title` goes before its handle's. */
export function titleOf(matches: readonly TitledMatch[], societyName: string): string {
  for (const match of [...matches].reverse()) {
    const loaded = titledSchema.safeParse(match.loaderData);
    const title = loaded.success ? loaded.data.title : readHandle(match.handle).title;
    if (title !== undefined) return `${title}. ${societyName}`;
  }
  return societyName;
}
