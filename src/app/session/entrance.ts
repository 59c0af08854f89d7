import { ChangeDetectionStrategy, Component, input, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Logo } from '../shared/plumb/logo';

/** The frame of every page that stands before the door: a form beside a still of a lift. */
@Component({
  selector: 'mf-entrance',
  imports: [Logo, RouterLink],
  templateUrl: './entrance.html',
  styleUrl: './entrance.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Entrance {
  readonly heading = input.required<string>();
  readonly sub = input<string>();

  /** Whether the still can be shown; without it the panel stays plain chalk with the plumb line. */
  protected readonly hasStill = signal(true);
}
