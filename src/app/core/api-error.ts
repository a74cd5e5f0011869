import { HttpErrorResponse } from '@angular/common/http';
import { problem, type ProblemDocument } from '@shared/api/common';

/** A failed request in words for the person at the screen. */
export interface ApiFailure {
  /** What failed, in a few words. */
  readonly title: string;
  /** What can be done about it. */
  readonly detail: string;
  /** All of it in a sentence or two, for where there is no heading: the server's own words alone where it gave any. */
  readonly words: string;
  /** HTTP status; 0 when no answer came at all. */
  readonly status: number;
  /** Field path to sentence, where single fields were at fault; empty otherwise. */
  readonly fields: Readonly<Record<string, string>>;
  /** To be quoted to whoever reads the server's log. */
  readonly requestId?: string;
}

/** Puts anything that a request may end in into words: problem documents, lost connections, broken answers. */
export function describeFailure(error: unknown): ApiFailure {
  if (!(error instanceof HttpErrorResponse)) return brokenAnswer;
  if (error.status === 0) return noAnswer;
  const document = readProblem(error.error);
  if (document)
    return {
      // The document's own title is the protocol's word for the status ("Unauthorized"), which tells a person nothing.
      title: error.status >= 500 ? 'The server could not do it' : 'The server refused',
      detail: document.detail,
      words: document.detail,
      status: error.status,
      fields: document.errors ?? {},
      requestId: document.instance,
    };
  return withWords({
    title: 'The server could not answer',
    detail: `It answered with status ${error.status}. Try again; if it stays so, tell your administrator.`,
    status: error.status,
    fields: {},
  });
}

const noAnswer = withWords({
  title: 'The server cannot be reached',
  detail: 'Check that this computer is on the plant network, then try again.',
  status: 0,
  fields: {},
});

const brokenAnswer = withWords({
  title: 'The answer was not understood',
  detail: 'This page may be older than the server: reload it. If it stays so, tell your administrator.',
  status: 200,
  fields: {},
});

function withWords(failure: Omit<ApiFailure, 'words'>): ApiFailure {
  return { ...failure, words: `${failure.title}. ${failure.detail}` };
}

function readProblem(body: unknown): ProblemDocument | undefined {
  const parsed = problem.safeParse(typeof body === 'string' ? parseJson(body) : body);
  return parsed.success ? parsed.data : undefined;
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined; // a proxy's HTML page: there is no problem document in it
  }
}
