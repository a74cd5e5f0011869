import cron, { type Logger as CronLogger } from 'node-cron';
import type { Logger } from 'pino';

export interface Work {
  /** Pulls values and evaluates; each minute. */
  collect(): Promise<void>;
  /** Deletes what has expired; each quarter of an hour. */
  tidyUp(): Promise<void>;
}

export interface Jobs {
  /** No more work; waits for what is running, `graceMs` at most. */
  stop(graceMs: number): Promise<void>;
}

/**
 * Does the work at its times, each kind one at a time. The first cycle starts at once: after a stop there are minutes to
 * catch up on, and nobody should wait for the next full one. A tick that was missed is not made up for, which is why
 * collecting goes on from its watermark.
 */
export function startJobs(work: Work, logger: Logger): Jobs {
  let stopping = false;
  const run = async (name: string, job: () => Promise<void>) => {
    if (stopping) return;
    try {
      await job();
    } catch (error) {
      logger.error({ err: error, job: name }, 'a bug: a job failed');
    }
  };
  const options = { noOverlap: true, timezone: 'Etc/UTC', logger: toPino(logger) };
  const first = run('collect', () => work.collect()).then(() => {
    if (stopping) return;
    // Five seconds past, when the historian has the minute.
    cron.schedule('5 * * * * *', () => run('collect', () => work.collect()), { ...options, name: 'collect' });
    cron.schedule('40 */15 * * * *', () => run('tidy-up', () => work.tidyUp()), {
      ...options,
      name: 'tidy-up',
    });
  });
  return {
    async stop(graceMs) {
      stopping = true;
      const grace = new Promise<void>((resolve) => setTimeout(resolve, graceMs).unref());
      await Promise.race([Promise.all([first, cron.shutdown(graceMs)]), grace]);
    },
  };
}

/** A late tick is worth knowing when somebody looks for it, not a warning a minute on a busy machine. */
function toPino(logger: Logger): CronLogger {
  return {
    info: (message) => logger.debug(message),
    warn: (message) => logger.info(message),
    error: (message, error) => logger.error({ err: error ?? message }, 'scheduling'),
    debug: (message) => logger.trace(String(message)),
  };
}
