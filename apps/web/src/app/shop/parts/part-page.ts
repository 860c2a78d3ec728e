import { ChangeDetectionStrategy, Component, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { LoadNote, MoneyText, PageHead } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { partNotes } from './part-words';
import { type Part, PartsApi } from './parts-api';

@Component({
  selector: 'tw-part-page',
  imports: [LoadNote, MatButton, MoneyText, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (part.hasValue()) {
      @let shown = part.value();
      <tw-page-head
        [heading]="shown.number"
        [sub]="[shown.name].concat(partNotes(shown)).join(' · ')"
        upLink="/shop/parts"
        upLabel="Parts"
      >
        @if (session.mayChange('parts.change')) {
          <a matButton="outlined" routerLink="change">Change</a>
          @if (shown.endedAt) {
            <button matButton="outlined" type="button" (click)="resume(shown)">Offer again</button>
          } @else {
            <button matButton="outlined" class="tw-destructive" type="button" (click)="end(shown)">
              End
            </button>
          }
        }
      </tw-page-head>
      <dl class="tw-facts">
        <dt>Class</dt>
        <dd>{{ shown.category }}</dd>
        <dt>Supplier</dt>
        <dd>{{ shown.supplier || 'not noted' }}</dd>
        <dt>Made by</dt>
        <dd>{{ shown.makersPart ? 'the maker' : 'another; an equivalent' }}</dd>
        <dt>One costs us</dt>
        <dd><tw-money [amount]="shown.unitCost" /></dd>
        <dt>Sold for</dt>
        <dd>
          @if (shown.fixedPrice !== null) {
            <tw-money [amount]="shown.fixedPrice" />
          } @else {
            its cost and the markup of the price book
          }
        </dd>
        @if (shown.successor; as next) {
          <dt>Its place took</dt>
          <dd>
            <a [routerLink]="['/shop/parts', next.id]">{{ next.number }}, {{ next.name }}</a>
          </dd>
        }
      </dl>
    } @else {
      <tw-page-head heading="Part" upLink="/shop/parts" upLabel="Parts" />
      <tw-load-note [of]="part" />
    }
  `,
})
export class PartPage {
  readonly #api = inject(PartsApi);
  readonly #messages = inject(Messages);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);
  protected readonly partNotes = partNotes;

  readonly partId = input.required<string>();

  protected readonly part = rxResource({
    params: () => this.partId(),
    stream: ({ params }) => this.#api.show(params),
  });

  constructor() {
    reloadOn(this.part, 'parts');
    effect(() => {
      if (this.part.hasValue()) this.#titles.name(this.part.value().number);
    });
  }

  protected async end(part: Part): Promise<void> {
    const ended = await firstValueFrom(this.#api.end(part));
    this.part.set(ended);
    this.#messages.say(`${part.number} is offered no more.`, {
      label: 'Undo',
      run: () => void this.resume(ended),
    });
  }

  protected async resume(part: Part): Promise<void> {
    this.part.set(await firstValueFrom(this.#api.resume(part)));
    this.#messages.say(`${part.number} is offered again.`);
  }
}
