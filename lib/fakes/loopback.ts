import { once } from 'node:events';
import { createServer, type RequestListener } from 'node:http';

const HOST = '127.0.0.1';
const FORCED_CLOSE_MS = 2_000;

export interface RunningFake {
  /** Origin without a trailing slash. */
  url: string;
  /** Stops listening; requests under way get two seconds to end. */
  close(): Promise<void>;
}

/** Serves on the loopback address only; port 0 takes a free one. */
export async function listenOnLoopback(port: number, listener: RequestListener): Promise<RunningFake> {
  const server = createServer(listener);
  server.listen(port, HOST);
  await once(server, 'listening');
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('The server has no TCP address.');
  const close = async () => {
    const closed = once(server, 'close');
    server.close();
    const force = setTimeout(() => server.closeAllConnections(), FORCED_CLOSE_MS);
    await closed;
    clearTimeout(force);
  };
  return { url: `http://${HOST}:${address.port}`, close };
}
