import type { MeasureKind, View } from '@contract';
import type { KeyBinding } from '../shared/keys/key-binding';
import { faultKey } from './board-words';
import type { PlaybackClock } from './playback/playback-clock';
import type { Seeing } from './seeing';

/** What the keys act on. Letters are not bound: they start a comment. */
interface KeyedBoard {
  readonly clock: PlaybackClock;
  readonly seeing: Seeing;
  choose(view: View): void;
  step(frames: number): void;
  seek(toMs: number): void;
  arrow(byX: number, byY: number): void;
  turnBeside(): void;
  measure(kind: MeasureKind): void;
  rep(kind: 'top' | 'bottom'): void;
  pressFaultAt(index: number): void;
  focusComposer(): void;
  escape(): void;
  send(): Promise<void>;
}

/** Every key of the board; the sheet under `?` is made from the same list. */
export function boardKeys(board: KeyedBoard): KeyBinding[] {
  const see = 'Seeing';
  const say = 'Saying';
  const tools = 'Measuring';
  return [
    { key: 'Space', label: 'play or pause', group: see, run: () => board.clock.toggle() },
    { key: 'ArrowLeft', label: 'one frame back', group: see, run: () => board.arrow(-1, 0), repeats: true },
    { key: 'ArrowRight', label: 'one frame on', group: see, run: () => board.arrow(1, 0), repeats: true },
    { key: 'PageUp', label: 'ten frames back', group: see, run: () => board.step(-10), repeats: true },
    { key: 'PageDown', label: 'ten frames on', group: see, run: () => board.step(10), repeats: true },
    { key: 'Home', label: 'to the start', group: see, run: () => board.seek(0) },
    { key: 'End', label: 'to the end', group: see, run: () => board.seek(board.clock.durationMs()) },
    { key: ',', label: 'slower', group: see, run: () => board.clock.shiftSpeed(-1) },
    { key: '.', label: 'faster', group: see, run: () => board.clock.shiftSpeed(1) },
    { key: '[', label: 'repeat from here', group: see, run: () => board.seeing.setLoopEnd('start') },
    { key: ']', label: 'repeat up to here', group: see, run: () => board.seeing.setLoopEnd('end') },
    { key: '\\', label: 'repeat around here, or stop', group: see, run: () => board.seeing.turnLoop() },
    { key: '|', label: 'plumb line', group: see, run: () => board.seeing.turnPlumb() },
    { key: '&', label: 'the earlier take beside', group: see, run: () => board.turnBeside() },
    { key: 'Shift+ArrowLeft', label: 'speak about the front', group: say, run: () => board.choose('front') },
    { key: 'Shift+ArrowRight', label: 'speak about the side', group: say, run: () => board.choose('side') },
    { key: 'ArrowUp', label: 'the comment before', group: say, run: () => board.arrow(0, -1) },
    { key: 'ArrowDown', label: 'the next comment', group: say, run: () => board.arrow(0, 1) },
    { key: 'Enter', label: 'comment here (or just type)', group: say, run: () => board.focusComposer() },
    { key: ';', label: 'comment on what repeats', group: say, run: () => board.seeing.turnSpan() },
    ...Array.from({ length: 10 }, (_, index): KeyBinding => ({
      key: faultKey(index) ?? '',
      label: `fault ${String(index + 1)}: seen, clear, hidden`,
      group: say,
      run: () => board.pressFaultAt(index),
    })),
    { key: 'Mod+Enter', label: 'send the answer', group: say, run: () => void board.send() },
    { key: '+', label: 'joint angle', group: tools, run: () => board.measure('angle') },
    { key: '-', label: 'lean', group: tools, run: () => board.measure('lean') },
    { key: '=', label: 'depth', group: tools, run: () => board.measure('depth') },
    { key: 'Shift+ArrowUp', label: 'a rep’s top is here', group: tools, run: () => board.rep('top') },
    { key: 'Shift+ArrowDown', label: 'a rep’s bottom is here', group: tools, run: () => board.rep('bottom') },
    { key: 'Escape', label: 'stop measuring', group: tools, run: () => board.escape() },
  ];
}
