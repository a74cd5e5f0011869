import { createServer, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';

/** Starts an app on a port (0: any free one); answers the server and its port once it listens. */
export async function listen(
  app: RequestListener,
  port: number,
  host: string,
): Promise<{ server: Server; port: number }> {
  const server = createServer(app);
  await new Promise<void>((ready, fail) => {
    server.once('error', fail);
    server.listen(port, host, ready);
  });
  return { server, port: (server.address() as AddressInfo).port };
}

/** Stops listening and ends what is still open. */
export async function close(server: Server): Promise<void> {
  const closed = new Promise<void>((done) => server.close(() => done()));
  server.closeAllConnections();
  await closed;
}
