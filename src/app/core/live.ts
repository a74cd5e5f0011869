import {
  DOCUMENT,
  DestroyRef,
  Injectable,
  InjectionToken,
  computed,
  effect,
  inject,
  signal,
  untracked,
} from '@angular/core';
import { Subject, type Observable } from 'rxjs';
import { streamEvent, streamPath, type StreamEvent } from '@shared/api/stream';
import { Clock } from './clock';
import { SessionStore } from './session';

/** What `Live` uses of the browser's EventSource, so that tests can stand in for it. */
export interface EventStream {
  addEventListener(type: string, listener: (event: MessageEvent<string>) => void): void;
  close(): void;
}
export const openEventStream = new InjectionToken<(url: string) => EventStream>('openEventStream', {
  providedIn: 'root',
  factory: () => (url) => new EventSource(url),
});

/** The stream's state: `off` when nobody is signed in or the tab is hidden. */
export type LiveState =
  | { readonly kind: 'off' }
  | { readonly kind: 'connecting' }
  | { readonly kind: 'connected' }
  /** `since` by the server's clock [UTC ms]. */
  | { readonly kind: 'lost'; readonly since: number };

const firstRetryMs = 1000;
const longestRetryMs = 15_000;
/** Beats come each 15 s at least: after two missed ones a connection that looks open is dead. */
const silenceMs = 40_000;

/** The live stream: one connection a tab, none while the tab is hidden or nobody is signed in. */
@Injectable({ providedIn: 'root' })
export class Live {
  private readonly open = inject(openEventStream);
  private readonly clock = inject(Clock);
  private readonly session = inject(SessionStore);
  private readonly document = inject(DOCUMENT);

  private readonly eventsSubject = new Subject<StreamEvent>();
  private readonly reconnectedSubject = new Subject<void>();
  private readonly visible = signal(this.document.visibilityState !== 'hidden');
  private readonly currentState = signal<LiveState>({ kind: 'off' });
  private readonly beat = signal<number | null>(null);
  private readonly opened = signal(0);

  /** Everything the server says, as it says it. */
  readonly events: Observable<StreamEvent> = this.eventsSubject.asObservable();
  /** The stream is back after a gap in which events were missed: read again what is shown. */
  readonly reconnected: Observable<void> = this.reconnectedSubject.asObservable();
  /** Counts the gaps, so that a resource may depend on it and be read again after each. */
  readonly gaps = computed(() => Math.max(0, this.opened() - 1));
  readonly state = this.currentState.asReadonly();
  readonly connected = computed(() => this.currentState().kind === 'connected');
  /** When the server was last heard of [UTC ms]; null before the first time. */
  readonly lastBeat = this.beat.asReadonly();

  private stream: EventStream | null = null;
  private retry: ReturnType<typeof setTimeout> | undefined;
  private retryMs = firstRetryMs;

  constructor() {
    const onVisibility = () => this.visible.set(this.document.visibilityState !== 'hidden');
    this.document.addEventListener('visibilitychange', onVisibility);
    const wanted = computed(() => this.visible() && this.session.user() !== null);
    effect(() => {
      const isWanted = wanted();
      untracked(() => (isWanted ? this.connect() : this.stop()));
    });
    const watching = setInterval(() => this.watch(), 5000);
    inject(DestroyRef).onDestroy(() => {
      this.document.removeEventListener('visibilitychange', onVisibility);
      clearInterval(watching);
      this.stop();
    });
  }

  private connect(): void {
    this.close();
    this.currentState.update((state) => (state.kind === 'lost' ? state : { kind: 'connecting' }));
    const stream = this.open(streamPath);
    this.stream = stream;
    // A connection that was given up may still report: only the present one counts.
    const whilePresent = (act: () => void) => () => {
      if (this.stream === stream) act();
    };
    stream.addEventListener(
      'open',
      whilePresent(() => this.onOpen()),
    );
    stream.addEventListener(
      'error',
      whilePresent(() => this.onLost()),
    );
    for (const { shape } of streamEvent.options)
      stream.addEventListener(shape.type.value, (message: MessageEvent<string>) => {
        if (this.stream === stream) this.onMessage(message.data);
      });
  }

  private onOpen(): void {
    this.retryMs = firstRetryMs;
    this.beat.set(this.clock.now());
    this.currentState.set({ kind: 'connected' });
    this.opened.update((count) => count + 1);
    if (this.opened() > 1) this.reconnectedSubject.next();
  }

  private onMessage(data: string): void {
    const parsed = streamEvent.safeParse(JSON.parse(data));
    if (!parsed.success) return console.error('An event of the stream was not understood', parsed.error);
    this.clock.follow(parsed.data.now);
    this.beat.set(parsed.data.now);
    this.eventsSubject.next(parsed.data);
  }

  private onLost(): void {
    this.close();
    this.currentState.update((state) =>
      state.kind === 'lost' ? state : { kind: 'lost', since: this.beat() ?? this.clock.now() },
    );
    this.retry = setTimeout(() => this.connect(), this.retryMs);
    this.retryMs = Math.min(this.retryMs * 2, longestRetryMs);
    // An ended session looks like a lost connection here, since the browser hides the status.
    void this.session.check();
  }

  private watch(): void {
    const silent = this.clock.now() - (this.beat() ?? this.clock.now());
    if (this.connected() && silent > silenceMs) this.onLost();
  }

  private stop(): void {
    this.close();
    this.retryMs = firstRetryMs;
    this.currentState.set({ kind: 'off' });
  }

  private close(): void {
    clearTimeout(this.retry);
    this.stream?.close();
    this.stream = null;
  }
}
