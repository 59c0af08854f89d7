import { ChangeDetectionStrategy, Component } from '@angular/core';
import { PageHeading } from '../shared/page-heading/page-heading';

@Component({
  selector: 'mf-people-page',
  imports: [PageHeading],
  template: `<div class="mf-page"><mf-page-heading heading="People" /></div>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PeoplePage {}
