import {
  ChangeDetectionStrategy,
  Component,
  effect,
  inject,
  input,
  untracked,
} from '@angular/core';
import { RouterOutlet } from '@angular/router';
import { PageHead, ProblemNote } from '@lib/ui';
import { FieldVisit } from '../sheets/field-visit';

/** Holds the visit that its pages share: the visit itself, its jobs, handing over, signing off. */
@Component({
  selector: 'tw-visit-frame',
  imports: [PageHead, ProblemNote, RouterOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
  providers: [FieldVisit],
  template: `
    @if (visit.sheet()) {
      <router-outlet />
    } @else if (visit.problem(); as problem) {
      <tw-page-head heading="Visit" upLink="/field/day" upLabel="Day" />
      <tw-problem
        [problem]="problem"
        [retriable]="problem.kind !== 'not-found'"
        (retry)="visit.reload()"
      />
    } @else {
      <p class="tw-soft" role="status">Loading the visit</p>
    }
  `,
  styles: `
    :host {
      display: block;
      max-inline-size: 40rem;
    }
  `,
})
export class VisitFrame {
  protected readonly visit = inject(FieldVisit);
  readonly visitId = input.required<string>();

  constructor() {
    effect(() => {
      const id = this.visitId();
      untracked(() => void this.visit.open(id));
    });
  }
}
