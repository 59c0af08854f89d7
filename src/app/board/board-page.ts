import { ChangeDetectionStrategy, Component } from '@angular/core';
import { PageHeading } from '../shared/page-heading/page-heading';

@Component({
  selector: 'mf-board-page',
  imports: [PageHeading],
  template: `<div class="mf-page"><mf-page-heading heading="Board" /></div>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BoardPage {}
