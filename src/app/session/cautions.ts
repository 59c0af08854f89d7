import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The words of caution, the same on the first-use screen and on their own page. */
@Component({
  selector: 'mf-cautions',
  template: `
    <ul class="mf-list">
      <li>
        <h2>If something hurts, stop this lift</h2>
        <p>
          Do not train through pain. Tell your coach when you send a clip: it goes to the top of the queue.
          See a doctor or a physiotherapist.
        </p>
      </li>
      <li class="urgent">
        <h2>Call the emergency number</h2>
        <p>for chest pain, fainting, numbness or weakness. Do not wait for an answer here.</p>
      </li>
      <li>
        <h2>This is coaching, not medical advice</h2>
        <p>
          A coach looks at a video and says what to change; nobody here diagnoses anything. Local law and
          licensed professionals come first.
        </p>
      </li>
      <li>
        <h2>Under 18</h2>
        <p>A guardian’s consent must be recorded before your clips can be seen.</p>
      </li>
      <li>
        <h2>Film only yourself</h2>
        <p>Choose a place where nobody else is in the picture, and a floor that is clear around you.</p>
      </li>
    </ul>
  `,
  styles: `
    h2 {
      margin-bottom: var(--mf-space-1);
    }

    .mf-list > li {
      padding: var(--mf-space-4) 0;
    }

    .urgent h2 {
      color: var(--mf-tape);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Cautions {}
