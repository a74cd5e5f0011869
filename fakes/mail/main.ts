import * as z from 'zod';
import { portSetting, readSettings, runFake } from '../http/run-fake';
import { startMailFake } from './start-mail-fake';

const settings = z.object({
  MAIL_HOST: z.string().default('127.0.0.1'),
  MAIL_PORT: portSetting.default(4603),
  SMTP_PORT: portSetting.default(4604),
});

await runFake('mail fake', async () => {
  const env = readSettings(settings, process.env);
  const { smtpPort, pagePort, stop } = await startMailFake({
    host: env.MAIL_HOST,
    smtpPort: env.SMTP_PORT,
    pagePort: env.MAIL_PORT,
    now: Date.now,
  });
  console.log(`mail fake: http://${env.MAIL_HOST}:${pagePort}, takes mail on port ${smtpPort}`);
  return stop;
});
