import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

const TINTS = ['#0e5a4a', '#50606a', '#7a3b12', '#3d4a7a', '#6b2f55', '#4c5a1c'] as const;

/** The first letters of the first and the last name; particles between them are passed over. */
export function initialsOf(name: string): string {
  const words = name.trim().split(/\s+/).filter(Boolean);
  const first = [...(words[0] ?? '?')][0] ?? '?';
  const last = words.length > 1 ? ([...(words.at(-1) ?? '')][0] ?? '') : '';
  return (first + last).toUpperCase();
}

/** A person's initials on a colour that stays theirs. The name itself must stand beside it or in a label. */
@Component({
  selector: 'mf-avatar',
  host: {
    'aria-hidden': 'true',
    '[style.width.px]': 'sizePx()',
    '[style.height.px]': 'sizePx()',
    '[style.font-size.px]': 'sizePx() * 0.42',
    '[style.background]': 'tint()',
  },
  template: `{{ initials() }}`,
  styles: `
    :host {
      display: inline-grid;
      flex: none;
      place-items: center;
      color: #fff;
      border-radius: 50%;
      font-family: var(--mf-font-figures);
      font-weight: 700;
      line-height: 1;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Avatar {
  readonly name = input.required<string>();
  /** Width and height in CSS pixels. */
  readonly sizePx = input(36);

  protected readonly initials = computed(() => initialsOf(this.name()));
  protected readonly tint = computed(() => {
    const sum = [...this.name()].reduce(
      (total, letter) => (total * 31 + (letter.codePointAt(0) ?? 0)) % 9973,
      7,
    );
    return TINTS[sum % TINTS.length];
  });
}
