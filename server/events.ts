import type { StreamEvent } from '@shared/api/stream';

type Listener = (event: StreamEvent) => void;

/** Carries what happened from the services to the live streams. Publish after the transaction has committed, never inside. */
export class EventBus {
  readonly #listeners = new Set<Listener>();

  publish(event: StreamEvent): void {
    for (const listener of [...this.#listeners]) listener(event);
  }

  /** @returns the call that ends the subscription */
  subscribe(listener: Listener): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }
}
