/** One key and what it does; the same entry feeds the keyboard and the sheet of keys. */
export interface KeyBinding {
  /** As `nameOfKey` writes it: `c`, `Space`, `Shift+ArrowLeft`, `Mod+Enter`. */
  readonly key: string;
  /** What it does, for the sheet: "one frame back". */
  readonly label: string;
  /** The heading it stands under in the sheet. */
  readonly group: string;
  readonly run: () => void;
  /** Whether holding the key down repeats the act. */
  readonly repeats?: boolean;
}
