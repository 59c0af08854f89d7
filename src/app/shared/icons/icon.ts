import { ChangeDetectionStrategy, Component, inject, Injectable, input } from '@angular/core';
import { MatIcon, MatIconRegistry } from '@angular/material/icon';
import { DomSanitizer } from '@angular/platform-browser';
import { ICONS, type IconName } from './icon-set';

/** Hands the drawings to Material's registry once, as literals: nothing is ever fetched for an icon. */
@Injectable({ providedIn: 'root' })
export class IconDrawings {
  constructor() {
    const registry = inject(MatIconRegistry);
    const sanitizer = inject(DomSanitizer);
    for (const [name, svg] of Object.entries(ICONS)) {
      // The text is part of our own bundle, so it can be trusted as it is.
      registry.addSvgIconLiteral(name, sanitizer.bypassSecurityTrustHtml(svg));
    }
  }
}

/** One drawing, hidden from screen readers: the words stand beside it or in the button's label. */
@Component({
  selector: 'mf-icon',
  imports: [MatIcon],
  template: `<mat-icon [svgIcon]="name()" [style.width.px]="sizePx()" [style.height.px]="sizePx()" />`,
  styles: `
    :host {
      display: inline-flex;
      flex: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Icon {
  /** Which drawing. */
  readonly name = input.required<IconName>();
  /** Width and height in CSS pixels. */
  readonly sizePx = input(22);

  constructor() {
    inject(IconDrawings);
  }
}
