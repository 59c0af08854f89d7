/** What of a keyboard event the rules look at, so that they can be tried without a browser. */
export interface PressedKey {
  readonly key: string;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly altKey: boolean;
  readonly shiftKey: boolean;
  readonly isComposing: boolean;
  readonly defaultPrevented: boolean;
}

/** Where the focus is when a key is pressed. */
export type KeyPlace = 'text' | 'button' | 'elsewhere';

/** How the page stands when a key is pressed. */
export interface KeyContext {
  readonly place: KeyPlace;
  /** A dialog, menu or sheet is open over the page. */
  readonly isCovered: boolean;
  /** Whether single keys act at all: a person's own choice (WCAG 2.2, 2.1.4). */
  readonly hasSingleKeys: boolean;
}

/** A key and its modifiers as one word: `c`, `Shift+ArrowLeft`, `Mod+Enter` (Ctrl or Cmd). Letters are lower case. */
export function nameOfKey(pressed: PressedKey): string {
  const letter = pressed.key.length === 1;
  const name = letter ? pressed.key.toLowerCase() : pressed.key;
  const parts = [
    pressed.ctrlKey || pressed.metaKey ? 'Mod+' : '',
    pressed.altKey ? 'Alt+' : '',
    // What Shift makes of a sign is already in the key itself: `?` and not `Shift+/`.
    pressed.shiftKey && !letter ? 'Shift+' : '',
  ];
  return parts.join('') + (name === ' ' ? 'Space' : name);
}

/** Keys that a focused button or link uses itself. */
const BUTTON_KEYS = new Set(['Space', 'Enter']);

/** Whether a key may act as a command where it was pressed. */
export function mayAct(pressed: PressedKey, context: KeyContext): boolean {
  if (pressed.isComposing || pressed.defaultPrevented || context.isCovered) return false;
  const name = nameOfKey(pressed);
  if (name.startsWith('Mod+')) return true;
  if (name === 'Escape') return true;
  if (!context.hasSingleKeys || context.place === 'text') return false;
  return !(context.place === 'button' && BUTTON_KEYS.has(name));
}

/** Input types that take no typing: single keys go on acting while they are focused, arrows aside. */
const TYPELESS = new Set([
  'button',
  'checkbox',
  'color',
  'file',
  'image',
  'radio',
  'range',
  'reset',
  'submit',
]);

/** What kind of element holds the focus. */
export function placeOf(element: Element | null): KeyPlace {
  if (!element) return 'elsewhere';
  if (element instanceof HTMLInputElement) return TYPELESS.has(element.type) ? 'button' : 'text';
  if (element instanceof HTMLTextAreaElement || element instanceof HTMLSelectElement) return 'text';
  if (element instanceof HTMLElement && element.isContentEditable) return 'text';
  return element.closest('button, a[href], summary, [role="button"], [role="option"]')
    ? 'button'
    : 'elsewhere';
}

const WORDS: Record<string, string> = {
  Space: 'Space',
  ArrowLeft: '←',
  ArrowRight: '→',
  ArrowUp: '↑',
  ArrowDown: '↓',
  Escape: 'Esc',
};

/** A key as its cap reads: `C`, `Shift ←`, `Ctrl Enter`. */
export function keyWords(name: string): string {
  return (
    name
      // A plus between two parts joins them; one that stands alone is the key itself.
      .split(/(?<=.)\+(?=.)/)
      .map((part) =>
        part === 'Mod' ? 'Ctrl' : (WORDS[part] ?? (part.length === 1 ? part.toUpperCase() : part)),
      )
      .join(' ')
  );
}
