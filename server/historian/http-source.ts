import {
  historianLatest,
  historianPaths,
  historianRaw,
  historianTagPage,
  historianWritten,
  type HistorianRawRequest,
} from '@shared/api/historian';
import * as z from 'zod';
import { SourceFailure, type HistorianSource, type SourceValue } from './historian-source';

export const httpSourceSettings = z.object({
  kind: z.literal('http'),
  url: z.url(),
  token: z.string().min(1),
  timeoutSeconds: z.number().positive().max(300).default(20),
});
export type HttpSourceSettings = z.infer<typeof httpSourceSettings>;

/** A historian that speaks our own HTTP contract (`shared/api/historian.ts`). */
export class HttpSource implements HistorianSource {
  constructor(private readonly settings: HttpSourceSettings) {}

  async listTags(search: string, cursor?: string) {
    const query = new URLSearchParams({ search, ...(cursor === undefined ? {} : { cursor }) });
    return this.#ask(`${historianPaths.tags}?${query.toString()}`, historianTagPage);
  }

  async readLatest(tags: readonly string[]) {
    return (await this.#ask(historianPaths.latest, historianLatest, { tags })).values;
  }

  async readRaw(tags: readonly string[], from: number, to: number, continuation?: string) {
    const question: HistorianRawRequest = { tags: [...tags], from, to, continuation };
    return this.#ask(historianPaths.raw, historianRaw, question);
  }

  async write(values: readonly SourceValue[]) {
    return (await this.#ask(historianPaths.write, historianWritten, { values })).results;
  }

  async #ask<T extends z.ZodType>(path: string, answerSchema: T, body?: unknown): Promise<z.infer<T>> {
    const { url, token, timeoutSeconds } = this.settings;
    let text: string;
    let status: number;
    try {
      const answer = await fetch(new URL(path, url), {
        method: body === undefined ? 'GET' : 'POST',
        headers: {
          authorization: `Bearer ${token}`,
          ...(body === undefined ? {} : { 'content-type': 'application/json' }),
        },
        body: body === undefined ? undefined : JSON.stringify(body),
        signal: AbortSignal.timeout(timeoutSeconds * 1000),
      });
      status = answer.status;
      text = await answer.text();
    } catch (error) {
      throw unreachable(error, url, timeoutSeconds);
    }
    if (status === 401 || status === 403)
      throw new SourceFailure(
        'refused',
        `The historian at ${url} refused the token (${status}); check the source's token.`,
      );
    if (status !== 200)
      throw new SourceFailure('failed', `The historian at ${url} answered ${status}: ${text.slice(0, 200)}`);
    let parsed: unknown;
    try {
      parsed = JSON.parse(text);
    } catch {
      throw new SourceFailure('malformed', `The historian at ${url} answered something that is not JSON.`);
    }
    const checked = answerSchema.safeParse(parsed);
    if (!checked.success) {
      const [issue] = checked.error.issues;
      throw new SourceFailure(
        'malformed',
        `The historian at ${url} answered outside the contract: ${issue?.path.join('.')}: ${issue?.message}`,
      );
    }
    return checked.data;
  }
}

function unreachable(error: unknown, url: string, timeoutSeconds: number): SourceFailure {
  if (error instanceof Error && error.name === 'TimeoutError')
    return new SourceFailure('timeout', `The historian at ${url} did not answer within ${timeoutSeconds} s.`);
  const { code } = (error instanceof Error ? (error.cause ?? error) : {}) as { code?: string };
  const why =
    code === 'ECONNREFUSED'
      ? 'nothing listens there'
      : code === 'ENOTFOUND'
        ? 'no machine has that name'
        : (code ?? String(error));
  return new SourceFailure('unreachable', `The historian at ${url} cannot be reached: ${why}.`);
}
