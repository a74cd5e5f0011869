import { resolve } from 'node:path';
import { root } from './environment.mjs';

/** Ports and folders of the demonstration: PORT moves all of them, so that two checkouts run beside each other. */
export function demoSettings(env = process.env) {
  const port = Number(env.PORT ?? 4600);
  const dataDir = resolve(root, env.DATA_DIR ?? '.data');
  return {
    host: '127.0.0.1',
    dataDir,
    ports: {
      server: port,
      historian: Number(env.HISTORIAN_PORT ?? port + 1),
      mailPage: Number(env.MAIL_PORT ?? port + 3),
      mail: Number(env.SMTP_PORT ?? port + 4),
    },
    env(ports) {
      return {
        DEMO: '1',
        PORT: String(ports.server),
        DATA_DIR: dataDir,
        HISTORIAN_PORT: String(ports.historian),
        HISTORIAN_URL: `http://127.0.0.1:${ports.historian}`,
        HISTORIAN_TOKEN: env.HISTORIAN_TOKEN ?? 'demonstration-historian',
        HISTORIAN_CONTROL_TOKEN: env.HISTORIAN_CONTROL_TOKEN ?? 'demonstration-control',
        MAIL_PORT: String(ports.mailPage),
        SMTP_PORT: String(ports.mail),
      };
    },
  };
}
