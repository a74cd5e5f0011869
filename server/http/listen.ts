import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';

/** Why the port cannot be had, in one sentence. */
export class ListenError extends Error {}

/** Listens; port 0 takes a free one. @returns the port it listens on */
export function listen(server: Server, { host, port }: { host: string; port: number }): Promise<number> {
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) =>
      reject(new ListenError(wordsFor(error, host, port))),
    );
    server.listen(port, host, () => resolve((server.address() as AddressInfo).port));
  });
}

function wordsFor(error: NodeJS.ErrnoException, host: string, port: number): string {
  switch (error.code) {
    case 'EADDRINUSE':
      return `Port ${port} is in use: stop what uses it, or set PORT to another.`;
    case 'EACCES':
      return `Port ${port} may not be opened by this user: set PORT to one above 1023.`;
    case 'EADDRNOTAVAIL':
    case 'ENOTFOUND':
      return `HOST "${host}" is not an address of this machine.`;
    default:
      return `The server cannot listen on ${host}:${port}: ${error.message}.`;
  }
}
