import type { AddressInfo } from 'node:net';
import { close, listen } from '../http/listen';
import { createMailFake, type MailFake, type MailFakeOptions } from './mail-fake';

export interface RunningMailFake extends MailFake {
  readonly smtpPort: number;
  readonly pagePort: number;
  stop(): Promise<void>;
}

/** Starts both servers of a mail fake; port 0 takes any free one. */
export async function startMailFake(
  options: MailFakeOptions & { readonly host: string; readonly smtpPort: number; readonly pagePort: number },
): Promise<RunningMailFake> {
  const fake = createMailFake(options);
  const { server: pages, port: pagePort } = await listen(fake.app, options.pagePort, options.host);
  const sockets = await new Promise<ReturnType<typeof fake.smtp.listen>>((ready, fail) => {
    fake.smtp.server.once('error', fail);
    const listening = fake.smtp.listen(options.smtpPort, options.host, () => ready(listening));
  }).catch(async (error: unknown) => {
    await close(pages);
    throw error;
  });
  return {
    ...fake,
    smtpPort: (sockets.address() as AddressInfo).port,
    pagePort,
    async stop() {
      await Promise.all([close(pages), new Promise<void>((closed) => fake.smtp.close(closed))]);
    },
  };
}
