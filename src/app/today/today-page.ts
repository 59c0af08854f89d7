import { ChangeDetectionStrategy, Component } from '@angular/core';
import { PageHeading } from '../shared/page-heading/page-heading';

@Component({
  selector: 'mf-today-page',
  imports: [PageHeading],
  template: `<div class="mf-page"><mf-page-heading heading="Today" /></div>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TodayPage {}
