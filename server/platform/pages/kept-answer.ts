// A body that is kept: compressed once, with a tag by which a reader learns that nothing has changed.
import { createHash } from 'node:crypto';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';
import type { Request, Response } from 'express';

export type KeptAnswer = {
  status: number;
  type: string;
  etag: string;
  plain: Buffer;
  gzip: Buffer;
  brotli: Buffer;
};

const toGzip = promisify(gzip);
const toBrotli = promisify(brotliCompress);
// The drawing stands twice in a page, in its HTML and in its state; a wide window makes the second free.
const BROTLI = { params: { [constants.BROTLI_PARAM_QUALITY]: 9, [constants.BROTLI_PARAM_LGWIN]: 20 } };

export async function keepAnswer(body: string, type: string, status = 200): Promise<KeptAnswer> {
  const plain = Buffer.from(body);
  const [zipped, brotli] = await Promise.all([toGzip(plain, { level: 9 }), toBrotli(plain, BROTLI)]);
  // Weak, because the same page goes out in three encodings.
  const etag = `W/"${createHash('sha256').update(plain).digest('base64url').slice(0, 27)}"`;
  return { status, type, etag, plain, gzip: zipped, brotli };
}

/** Express answers 304 and the bare head by itself. */
export function sendKept(req: Request, res: Response, kept: KeptAnswer): void {
  const encoding = req.acceptsEncodings('br', 'gzip', 'identity');
  res.status(kept.status).type(kept.type);
  res.vary('Accept-Encoding');
  if (kept.status === 200)
    res.set({ ETag: kept.etag, 'Cache-Control': 'public, max-age=0, must-revalidate' });
  else res.set('Cache-Control', 'no-store');
  if (encoding === 'br') res.set('Content-Encoding', 'br').send(kept.brotli);
  else if (encoding === 'gzip') res.set('Content-Encoding', 'gzip').send(kept.gzip);
  else res.send(kept.plain);
}
