import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { View } from '@contract';

/** How high the phone stands, as people say it. */
export type PhoneHeight = 'knee' | 'hip' | 'chest';

/** Heights on the drawing, in its units from the top; the floor is at 108 and the figure's head at 30. */
const PHONE_Y: Record<PhoneHeight, number> = { knee: 88, hip: 70, chest: 48 };

/**
 * A line drawing of how to set the phone down: the phone at its height and distance, and the person turned as the view
 * wants it (facing the phone for `front`, side-on to it for `side`).
 */
@Component({
  selector: 'mf-brief-figure',
  host: { role: 'img', '[attr.aria-label]': 'words()' },
  templateUrl: './brief-figure.html',
  styleUrl: './brief-figure.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BriefFigure {
  readonly view = input.required<View>();
  readonly height = input<PhoneHeight>('hip');
  /** From the phone to the feet, in metres. */
  readonly distanceM = input(3);

  protected readonly phoneY = computed(() => PHONE_Y[this.height()]);
  protected readonly words = computed(() => {
    const turned = this.view() === 'front' ? 'you face the phone' : 'the phone sees you from the side';
    return `Phone at ${this.height()} height, ${this.distanceM()} metres away; ${turned}.`;
  });
}
