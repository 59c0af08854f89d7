import { DOCUMENT, effect, inject, Injectable, signal } from '@angular/core';
import { localChoice } from './local-choice';

/** Follow the system, or always one of the two. */
export type ThemeChoice = 'system' | 'light' | 'dark';

const THEME_KEY = 'midfoot.theme';
const SHORTCUTS_KEY = 'midfoot.shortcuts';

function readTheme(): ThemeChoice {
  const kept = localChoice.read(THEME_KEY);
  return kept === 'light' || kept === 'dark' ? kept : 'system';
}

/** What a person chose for this browser: the theme, and whether single keys act (WCAG 2.2, 2.1.4). */
@Injectable({ providedIn: 'root' })
export class Preferences {
  readonly theme = signal(readTheme());
  readonly hasShortcuts = signal(localChoice.read(SHORTCUTS_KEY) !== 'off');

  constructor() {
    const { classList } = inject(DOCUMENT).documentElement;
    effect(() => {
      classList.toggle('mf-light', this.theme() === 'light');
      classList.toggle('mf-dark', this.theme() === 'dark');
    });
  }

  chooseTheme(theme: ThemeChoice): void {
    this.theme.set(theme);
    localChoice.write(THEME_KEY, theme === 'system' ? null : theme);
  }

  switchShortcuts(isOn: boolean): void {
    this.hasShortcuts.set(isOn);
    localChoice.write(SHORTCUTS_KEY, isOn ? null : 'off');
  }
}
