import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { LoadNote, PageHead, ProgressLine } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { SettingsApi } from '../settings/settings-api';
import { SetUpApi } from './set-up-facts';
import { nextStep, setUpSteps } from './set-up-steps';

/** Leads a fresh shop to its first visit: one step at a time, the rest in sight. */
@Component({
  selector: 'tw-set-up-page',
  imports: [LoadNote, MatButton, PageHead, ProgressLine, RouterLink],
  templateUrl: './set-up-page.html',
  styleUrl: './set-up-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SetUpPage {
  readonly #settings = inject(SettingsApi);
  readonly #api = inject(SetUpApi);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);

  protected readonly facts = rxResource({ stream: () => this.#api.facts() });
  protected readonly steps = computed(() =>
    this.facts.hasValue() ? setUpSteps(this.facts.value()) : [],
  );
  protected readonly next = computed(() => nextStep(this.steps()));
  protected readonly rest = computed(() => this.steps().filter((step) => step !== this.next()));
  protected readonly done = computed(() => this.steps().filter(({ done }) => done).length);

  constructor() {
    reloadOn(this.facts, 'shop', 'prices', 'clients', 'stores', 'machines', 'contacts', 'crew');
  }

  protected async finish(): Promise<void> {
    await firstValueFrom(this.#settings.finishSetUp());
    this.#messages.say('The set-up guide is put away. Everything in it stays under its own name.');
    await this.#router.navigate(['/shop/today']);
  }
}
