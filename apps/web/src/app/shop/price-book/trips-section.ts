import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { AmountField, DistanceField, TextField } from '@lib/ui';
import { type BookForm, tripForm } from './book-form';

@Component({
  selector: 'tw-trips-section',
  imports: [AmountField, DistanceField, MatButton, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @let trips = book().controls.trips;
    <h2>Trips</h2>
    <p class="tw-soft">
      A visit has one trip, shared over its machines. The rule closest to the store holds: its tax
      place before its part of your area before its distance. One rule must name nothing, for every
      other store.
    </p>
    @for (trip of trips.controls; track trip) {
      <fieldset class="tw-sheet tw-form entry">
        <legend class="tw-unseen">Trip rule {{ $index + 1 }}</legend>
        <div class="beside">
          <tw-text-field label="As the statement says it" [control]="trip.controls.label" />
          <tw-amount-field label="A trip" [control]="trip.controls.amount" />
        </div>
        <div class="beside">
          <tw-text-field label="Tax place" [control]="trip.controls.place" />
          <tw-text-field label="Part of your area" [control]="trip.controls.zone" />
          <tw-distance-field label="Up to" [control]="trip.controls.upToMetres" />
        </div>
        @if (trips.length > 1) {
          <div>
            <button matButton type="button" (click)="remove($index)">
              Remove<span class="tw-unseen"> trip rule {{ $index + 1 }}</span>
            </button>
          </div>
        }
      </fieldset>
    }
    <div class="tw-form">
      <div>
        <button matButton="outlined" type="button" (click)="add()">Add a trip rule</button>
      </div>
      <tw-amount-field
        label="What a trip costs us"
        [control]="book().controls.tripCost"
        hint="For what our own mistakes cost"
      />
    </div>
  `,
  styles: `
    .entry {
      margin-block-end: 0.75rem;
      padding: 1rem;
      border: 1px solid var(--tw-hairline);
    }
  `,
})
export class TripsSection {
  readonly book = input.required<BookForm>();

  protected add(): void {
    const { trips } = this.book().controls;
    trips.push(tripForm());
    trips.markAsDirty();
  }

  protected remove(index: number): void {
    const { trips } = this.book().controls;
    trips.removeAt(index);
    trips.markAsDirty();
  }
}
