// Puts one request to a handler without a network: real HTTP at both ends, over a pair of streams in memory.
import { createServer, request, type IncomingMessage, type RequestListener } from 'node:http';
import { duplexPair, type Duplex } from 'node:stream';
import { text } from 'node:stream/consumers';

export type InProcessRequest = {
  method: string;
  path: string;
  headers: Record<string, string>;
  body?: string | undefined;
  /** Whom the handler is to see as its caller. */
  remoteAddress?: string | undefined;
};
export type InProcessAnswer = { status: number; setCookies: readonly string[]; text: string };
export type InProcess = (question: InProcessRequest) => Promise<InProcessAnswer>;

/**
 * Frameworks change the prototype of the request they are given, so a made-up request breaks in their hands;
 * one that the parser of Node made does not.
 */
export function openInProcess(handler: RequestListener): InProcess {
  // It never listens: connections are handed to it.
  const server = createServer(handler);

  function connect(remoteAddress: string | undefined): Duplex {
    const [ours, theirs] = duplexPair();
    // An end travels from one to the other by itself, a breach does not.
    theirs.once('close', () => {
      if (!theirs.writableEnded) ours.destroy(new Error('the handler broke off'));
    });
    server.emit('connection', Object.assign(theirs, { remoteAddress }));
    return ours;
  }

  return async ({ method, path, headers, body, remoteAddress }) => {
    const answer = await new Promise<IncomingMessage>((resolve, reject) => {
      const asking = request(
        {
          method,
          path,
          headers: {
            ...headers,
            connection: 'close',
            ...(body !== undefined && { 'content-length': Buffer.byteLength(body) }),
          },
          createConnection: () => connect(remoteAddress),
        },
        resolve,
      );
      asking.on('error', reject);
      asking.end(body);
    });
    return {
      status: answer.statusCode ?? 500,
      setCookies: answer.headers['set-cookie'] ?? [],
      text: await text(answer),
    };
  };
}
