/** The part of autocannon 9 that the benches use; the package brings no types. */
declare module 'autocannon' {
  type Request = { method?: string; path?: string; headers?: Record<string, string> };

  type Options = {
    url: string;
    connections: number;
    /** seconds */
    duration: number;
    requests: { setupRequest: (request: Request) => Request }[];
  };

  type Result = { duration: number; errors: number; timeouts: number; non2xx: number };

  type Run = PromiseLike<Result> & {
    /** `responseTime` in milliseconds */
    on(
      event: 'response',
      listener: (client: unknown, statusCode: number, resBytes: number, responseTime: number) => void,
    ): void;
  };

  export default function autocannon(options: Options): Run;
}
