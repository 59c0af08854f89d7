import { ChangeDetectionStrategy, Component } from '@angular/core';
import { PageHeading } from '../shared/page-heading/page-heading';

@Component({
  selector: 'mf-answers-page',
  imports: [PageHeading],
  template: `<div class="mf-page"><mf-page-heading heading="Answers" /></div>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AnswersPage {}
