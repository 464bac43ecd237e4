// The small part of the load generator's types that the benches use.
declare module 'autocannon' {
  type Options = {
    url: string;
    connections: number;
    duration: number;
    workers?: number;
    headers?: Record<string, string>;
  };
  type Result = { requests: { average: number }; errors: number; non2xx: number };
  export default function autocannon(options: Options): Promise<Result>;
}
