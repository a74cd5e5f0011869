import { STATUS_CODES } from 'node:http';
import type { ProblemDocument } from '@shared/api/common';

/** An expected failure: answered with its status; `detail` tells a person what to do. */
export class Problem extends Error {
  constructor(
    readonly status: number,
    /** What kind of failure, for programs: lower-case words joined by hyphens. */
    readonly code: string,
    readonly detail: string,
    readonly extra: {
      /** Field path to sentence. */
      readonly errors?: Record<string, string>;
      /** When to try again [s]; answered as Retry-After too. */
      readonly retryAfterSeconds?: number;
    } = {},
  ) {
    super(detail);
    this.name = 'Problem';
  }

  toDocument(requestId?: string): ProblemDocument {
    return {
      type: `/problems/${this.code}`,
      title: STATUS_CODES[this.status] ?? 'Problem',
      status: this.status,
      detail: this.detail,
      ...(requestId === undefined ? {} : { instance: requestId }),
      ...(this.extra.errors === undefined ? {} : { errors: this.extra.errors }),
    };
  }
}
