import { QueryTypes, type Sequelize } from 'sequelize';
import type { Clock } from '../clock';
import { WriteQueue } from '../db/write-queue';

const failuresUntilLocked = 5;
const firstLock = 60_000;
const longestLock = 15 * 60_000;
const forgetAfter = 24 * 3600_000;

interface FailureRow {
  failures: number;
  locked_until: number | null;
  last_at: number;
}

export type Attempt =
  | {
      readonly kind: 'allowed';
      /** How long the name is locked unless it succeeds [ms]; 0 when not yet. */ readonly locksFor: number;
    }
  | { readonly kind: 'locked'; /** Time left [ms]. */ readonly remaining: number };

/**
 * Locks a name for an address after repeated failure: one minute after the fifth, doubling with each further one up to
 * fifteen.
 *
 * By name and address together: a lock on the name alone would let any stranger on the network keep the operator out by
 * typing wrong passwords. Unknown names are counted alike, so that a lock does not tell which names exist.
 */
export class SignInGuard {
  readonly #oneByOne = new WriteQueue();

  constructor(
    private readonly sequelize: Sequelize,
    private readonly clock: Clock,
  ) {}

  /**
   * Counts an attempt as failed before its password is looked at, so that many sent at once gain nothing; `succeeded`
   * takes the count back.
   */
  attempt(username: string, address: string): Promise<Attempt> {
    return this.#oneByOne.run(async () => {
      const now = this.clock.now();
      const row = await this.#find(username, address);
      const remaining = (row?.locked_until ?? 0) - now;
      if (remaining > 0) return { kind: 'locked', remaining };
      const failures = (row && now - row.last_at < forgetAfter ? row.failures : 0) + 1;
      const beyond = failures - failuresUntilLocked;
      const locksFor = beyond < 0 ? 0 : Math.min(firstLock * 2 ** beyond, longestLock);
      await this.sequelize.query(
        'INSERT INTO sign_in_failure (username, address, failures, last_at, locked_until) VALUES ($1, $2, $3, $4, $5) ' +
          'ON CONFLICT (username, address) DO UPDATE SET failures = excluded.failures, last_at = excluded.last_at, ' +
          'locked_until = excluded.locked_until',
        { bind: [username, address, failures, now, locksFor > 0 ? now + locksFor : null] },
      );
      return { kind: 'allowed', locksFor };
    });
  }

  async succeeded(username: string, address: string): Promise<void> {
    await this.sequelize.query('DELETE FROM sign_in_failure WHERE username = $1 AND address = $2', {
      bind: [username, address],
    });
  }

  /** Deletes what is too old to matter; to be called now and then. */
  async forgetOld(): Promise<void> {
    await this.sequelize.query('DELETE FROM sign_in_failure WHERE last_at < $1', {
      bind: [this.clock.now() - forgetAfter],
    });
  }

  async #find(username: string, address: string): Promise<FailureRow | undefined> {
    const [row] = await this.sequelize.query<FailureRow>(
      'SELECT failures, locked_until, last_at FROM sign_in_failure WHERE username = $1 AND address = $2',
      { bind: [username, address], type: QueryTypes.SELECT },
    );
    return row;
  }
}
