import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { labelFor } from '@lib/ui/words/words';
import { areaOf } from '../../core/navigation/areas';
import { isProblem } from '../../core/api/problem';
import { PlainPage } from '../../core/pages/plain-page';
import { Session } from '../../core/session/session';

/** For people who work for several shops, or own a store and repair others': as whom to go on. */
@Component({
  selector: 'tw-memberships',
  imports: [FormNotes, MatButton, PlainPage, TicketCard],
  templateUrl: './memberships.html',
  styleUrl: './memberships.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Memberships {
  readonly #router = inject(Router);
  protected readonly session = inject(Session);
  protected readonly notes = signal<readonly string[]>([]);

  protected readonly choices = computed(() =>
    this.session.memberships().map((one) => ({
      id: one.id,
      copy: areaOf(one.role).copy,
      name: one.clientName ?? one.shopName ?? 'Tumblewright',
      at: one.clientName ? `at ${one.shopName}` : '',
      role: labelFor(one.role),
    })),
  );

  protected async goOnAs(id: string): Promise<void> {
    await this.#tried(async () => {
      if (id !== this.session.membership()?.id) await this.session.switchTo(id);
      await this.#router.navigateByUrl('/');
    });
  }

  protected async signOut(): Promise<void> {
    await this.#tried(async () => {
      await this.session.signOut();
      await this.#router.navigateByUrl('/sign-in');
    });
  }

  async #tried(work: () => Promise<void>): Promise<void> {
    try {
      this.notes.set([]);
      await work();
    } catch (error) {
      this.notes.set([isProblem(error) ? error.message : 'This did not work. Try again.']);
    }
  }
}
