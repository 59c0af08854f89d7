import {
  computed,
  DestroyRef,
  effect,
  inject,
  Injectable,
  InjectionToken,
  signal,
  untracked,
} from '@angular/core';
import { filter, Subject, type Observable } from 'rxjs';
import type { EventDto, EventType } from '@contract';
import { SessionStore } from '../session/session-store';

/** `off` while signed out; `reconnecting` once the line has been down for a moment. */
export type LiveState = 'off' | 'connecting' | 'live' | 'reconnecting';

/** The least of the browser's EventSource that is used here, so that tests can stand in for it. */
export type EventLine = Pick<EventSource, 'onopen' | 'onerror' | 'onmessage' | 'close'>;

/** Opens the line to the server. */
export const OPEN_EVENT_LINE = new InjectionToken<(url: string) => EventLine>('OPEN_EVENT_LINE', {
  providedIn: 'root',
  factory: () => (url) => new EventSource(url),
});

const FIRST_WAIT_MS = 1_000;
const LONGEST_WAIT_MS = 30_000;
/** A blink of the line is not worth a banner. */
const PATIENCE_MS = 4_000;

/**
 * What happens in the gym, live, while somebody is signed in. Feature stores listen and fetch what changed.
 * After a break the server sends what was missed since the last event seen; `resumed` tells stores that want to be
 * sure to fetch afresh.
 */
@Injectable({ providedIn: 'root' })
export class LiveEvents {
  private readonly session = inject(SessionStore);
  private readonly openLine = inject(OPEN_EVENT_LINE);
  private readonly happened = new Subject<EventDto>();
  private readonly cameBack = new Subject<void>();

  private line: EventLine | null = null;
  private lastSeq: number | null = null;
  private failures = 0;
  private retryTimer: ReturnType<typeof setTimeout> | undefined;
  private patienceTimer: ReturnType<typeof setTimeout> | undefined;

  /** How the line stands. */
  readonly state = signal<LiveState>('off');
  /** Every event, in the order of the stream. */
  readonly all: Observable<EventDto> = this.happened.asObservable();
  /** Tells that the line is up again after a break. */
  readonly resumed: Observable<void> = this.cameBack.asObservable();

  constructor() {
    const who = computed(() => this.session.user()?.id);
    effect(() => {
      const userId = who();
      untracked(() => {
        this.stop();
        if (userId !== undefined) this.connect();
      });
    });
    inject(DestroyRef).onDestroy(() => this.stop());
  }

  /** Only the events of these types. */
  of(...types: readonly EventType[]): Observable<EventDto> {
    return this.all.pipe(filter((event) => types.includes(event.type)));
  }

  private connect(): void {
    if (this.state() === 'off') this.state.set('connecting');
    const since = this.lastSeq === null ? '' : `?lastEventId=${this.lastSeq}`;
    const line = this.openLine(`/api/events${since}`);
    this.line = line;
    line.onopen = () => this.opened();
    line.onerror = () => this.failed();
    line.onmessage = (message: MessageEvent<string>) => this.take(message);
  }

  private opened(): void {
    clearTimeout(this.patienceTimer);
    this.patienceTimer = undefined;
    const isReturn = this.failures > 0;
    this.failures = 0;
    this.state.set('live');
    if (isReturn) this.cameBack.next();
  }

  private take(message: MessageEvent<string>): void {
    const event = JSON.parse(message.data) as EventDto;
    // The server may repeat the last ones after a break.
    if (this.lastSeq !== null && event.seq <= this.lastSeq) return;
    this.lastSeq = event.seq;
    this.happened.next(event);
  }

  /**
   * The browser's own retry gives up on any answer but 200, so the line is always opened anew from here. Asking who is
   * signed in renews a lapsed session on the way, or ends it.
   */
  private failed(): void {
    this.line?.close();
    this.line = null;
    this.patienceTimer ??= setTimeout(() => this.state.set('reconnecting'), PATIENCE_MS);
    const longest = Math.min(LONGEST_WAIT_MS, FIRST_WAIT_MS * 2 ** this.failures);
    this.failures += 1;
    // Half fixed, half by chance, so that a restarted server is not met by everybody at once.
    const waitMs = longest / 2 + (Math.random() * longest) / 2;
    this.retryTimer = setTimeout(() => void this.retry(), waitMs);
  }

  private async retry(): Promise<void> {
    try {
      if ((await this.session.check()) === 'signed-in' && this.line === null) this.connect();
    } catch {
      // Still out of reach: wait longer and ask again.
      if (this.state() !== 'off') this.failed();
    }
  }

  private stop(): void {
    clearTimeout(this.retryTimer);
    clearTimeout(this.patienceTimer);
    this.patienceTimer = undefined;
    this.line?.close();
    this.line = null;
    this.lastSeq = null;
    this.failures = 0;
    this.state.set('off');
  }
}
