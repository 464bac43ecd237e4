// Reads the stored elevation into its parts, taking only what a part is made of: paths of known kinds.
export const PATH_KINDS = ['sil', 'sil open', 'sil solid', 'cut', 'key', 'mark', 'glow'] as const;
export type PathKind = (typeof PATH_KINDS)[number];
export type DrawnPath = { kind: PathKind; d: string };
export type DrawnPart = { slug: string; paths: DrawnPath[] };

const GROUP = /<g\s+id="part-([a-z0-9-]+)"[^>]*>([\s\S]*?)<\/g>/g;
const PATH = /<path\s+class="([a-z ]+)"\s+d="([MmLlHhVvCcSsQqTtAaZz0-9., +-]+)"\s*\/>/g;

const findKind = (name: string): PathKind | undefined => PATH_KINDS.find((kind) => kind === name);

/** In the order of the drawing, which is the building order: later parts overlap earlier ones. */
export function splitDrawing(drawing: string): DrawnPart[] {
  return [...drawing.matchAll(GROUP)].map(([, slug = '', inner = '']) => ({
    slug,
    paths: [...inner.matchAll(PATH)].flatMap(([, name = '', d = '']) => {
      const kind = findKind(name);
      return kind ? [{ kind, d }] : [];
    }),
  }));
}
