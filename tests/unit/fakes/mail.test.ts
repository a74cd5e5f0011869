import { connect } from 'node:net';
import { createTransport, type Transporter } from 'nodemailer';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { problem } from '@shared/api/common';
import { type RunningMailFake, startMailFake } from '../../../fakes/mail/start-mail-fake';

// Real mail over real sockets takes its time where others work too.
vi.setConfig({ testTimeout: 60_000 });

const at = Date.UTC(2026, 8, 1, 6);
let fake: RunningMailFake;
let mail: Transporter;

beforeEach(async () => {
  fake = await startMailFake({
    host: '127.0.0.1',
    smtpPort: 0,
    pagePort: 0,
    now: () => at,
    keep: 3,
    largest: 20_000,
  });
  mail = sender(10_000);
});

afterEach(async () => {
  mail.close();
  await fake.stop();
});

/** @param patience how long it waits for an answer [ms] */
const sender = (patience: number) =>
  createTransport({
    host: '127.0.0.1',
    port: fake.smtpPort,
    connectionTimeout: 10_000,
    greetingTimeout: 10_000,
    socketTimeout: patience,
  });

const aMail = (changes: object = {}) => ({
  from: 'Dewmark <dewmark@skarn-inlet.example>',
  to: 'supervisor@skarn-inlet.example',
  subject: 'Week 36',
  text: 'All sensors in band.',
  ...changes,
});

const page = async (path: string, init?: RequestInit) => {
  const answer = await fetch(`http://127.0.0.1:${fake.pagePort}${path}`, init);
  return {
    status: answer.status,
    type: answer.headers.get('content-type') ?? '',
    text: await answer.text(),
    headers: answer.headers,
  };
};
const setMode = (body: string) =>
  page('/control/mode', { method: 'POST', headers: { 'content-type': 'application/json' }, body });

describe('a mail that is accepted', () => {
  it('is kept with its envelope, and shown in the list and on its own page', async () => {
    await mail.sendMail(aMail({ bcc: 'engineer@skarn-inlet.example' }));

    expect(fake.messages).toEqual([
      {
        id: 1,
        receivedAt: at,
        from: 'Dewmark <dewmark@skarn-inlet.example>',
        to: ['supervisor@skarn-inlet.example', 'engineer@skarn-inlet.example'],
        subject: 'Week 36',
        text: 'All sensors in band.\r\n',
        attachments: [],
      },
    ]);
    const list = await page('/');
    expect(list.type).toContain('text/html');
    expect(list.text).toContain('2026-09-01 06:00');
    expect(list.text).toContain('<a href="/message/1">Week 36</a>');
    expect((await page('/message/1')).text).toContain('All sensors in band.');
    expect(JSON.parse((await page('/messages')).text)).toEqual({ messages: fake.messages });
    expect(JSON.parse((await page('/messages/1')).text)).toEqual(fake.messages[0]);
  });

  it('keeps every letter of subject, text and attachment, however they are encoded', async () => {
    const subject =
      'Dépropaniseur: C4+ über der Grenze, 1,5 → 2,6 mol %, und noch einiges mehr, damit es umbricht';
    const text = `Temperature 49,8 °C.\n${'A line that is much longer than seventy-six characters, with an = sign. '.repeat(3)}\n`;
    await mail.sendMail(
      aMail({
        subject,
        text,
        html: '<p>not this one</p>',
        attachments: [{ filename: 'week.csv', content: Buffer.alloc(1000, 'a;b\n') }],
      }),
    );

    expect(fake.messages[0]?.subject).toBe(subject);
    expect(fake.messages[0]?.text.trimEnd().replaceAll('\r\n', '\n')).toBe(text.trimEnd());
    expect(fake.messages[0]?.attachments).toEqual([{ name: 'week.csv', bytes: 1000 }]);
    expect((await page('/message/1')).text).toContain('week.csv, 1000 bytes');
  });

  it('cannot smuggle markup into the pages, which forbid scripts as well', async () => {
    await mail.sendMail(
      aMail({ subject: '<script>alert(1)</script>', text: '<img src=x onerror="alert(2)">' }),
    );

    const list = await page('/');
    const message = await page('/message/1');
    expect(list.text).not.toContain('<script');
    expect(message.text).not.toContain('<script');
    expect(message.text).not.toContain('<img');
    expect(message.text).toContain('&lt;img src=x onerror=&quot;alert(2)&quot;&gt;');
    expect(message.headers.get('content-security-policy')).toBe("default-src 'none'; style-src 'self'");
  });

  it('pushes out the oldest when there are more than are kept', async () => {
    for (const subject of ['1', '2', '3', '4']) await mail.sendMail(aMail({ subject }));

    expect(fake.messages.map((message) => message.subject)).toEqual(['2', '3', '4']);
    expect((await page('/message/1')).status).toBe(404);
  });
});

describe('a mail that is not accepted', () => {
  it('is answered 552 when it is larger than allowed', async () => {
    await expect(mail.sendMail(aMail({ text: 'x'.repeat(30_000) }))).rejects.toMatchObject({
      responseCode: 552,
    });
    expect(fake.messages).toEqual([]);
  });

  it('is answered 550 in mode refuse, and taken again afterwards', async () => {
    expect(JSON.parse((await setMode('{"mode":"refuse"}')).text)).toEqual({ mode: 'refuse' });
    await expect(mail.sendMail(aMail())).rejects.toMatchObject({ code: 'EENVELOPE', responseCode: 550 });
    expect(fake.messages).toEqual([]);

    await setMode('{"mode":"accept"}');
    await mail.sendMail(aMail());
    expect(fake.messages).toHaveLength(1);
  });

  it('waits in mode stall until the sender gives up', async () => {
    fake.setMode('stall');
    const impatient = sender(500);
    await expect(impatient.sendMail(aMail())).rejects.toMatchObject({ code: 'ETIMEDOUT' });
    expect(fake.messages).toEqual([]);
    impatient.close();
  });

  it('goes on when mode stall ends before the sender gives up', async () => {
    fake.setMode('stall');
    const sent = mail.sendMail(aMail());
    await new Promise((later) => setTimeout(later, 100));
    expect(fake.messages).toEqual([]);
    await setMode('{"mode":"accept"}');
    await sent;
    expect(fake.messages).toHaveLength(1);
  });

  it('harms nobody when the connection breaks in the middle', async () => {
    const socket = connect(fake.smtpPort, '127.0.0.1');
    socket.on('error', () => undefined);
    await new Promise((greeted) => socket.once('data', greeted));
    socket.write('EHLO me\r\nMAIL FROM:<a@b.example>\r\nRCPT TO:<c@d.example>\r\nDATA\r\nSubject: half');
    await new Promise((later) => setTimeout(later, 50));
    socket.resetAndDestroy();
    await mail.sendMail(aMail());
    expect(fake.messages.map((message) => message.subject)).toEqual(['Week 36']);
  });
});

describe('the control of the mail fake', () => {
  it.each(['{"mode":"lose"}', '{}', '{"mode":'])(
    'answers %s with a problem that says what is wrong',
    async (body) => {
      const answer = await setMode(body);
      expect(answer.status).toBe(400);
      expect(answer.type).toContain('application/problem+json');
      expect(problem.parse(JSON.parse(answer.text)).detail).toMatch(/mode|read/);
    },
  );

  it('does not take what a form of another site could send', async () => {
    const answer = await page('/control/mode', {
      method: 'POST',
      headers: { 'content-type': 'text/plain' },
      body: '{"mode":"refuse"}',
    });
    expect(answer.status).toBe(400);
    await mail.sendMail(aMail());
    expect(fake.messages).toHaveLength(1);
  });
});
