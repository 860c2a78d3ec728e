import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  signal,
  viewChild,
} from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { wordFor } from '@lib/ui/words/words';
import { problemText } from '@lib/ui/notes/problem-text';
import { Confirm } from '../confirm/confirm';
import { Messages } from '../messages/messages';
import { LocalKeepings } from '../session/leaving';
import { Session } from '../session/session';
import { SchemeToggle } from '../scheme/scheme-toggle';

/** Who is signed in, as whom else they could go on, their account, the scheme, and the way out. */
@Component({
  selector: 'tw-account-menu',
  imports: [RouterLink, SchemeToggle],
  templateUrl: './account-menu.html',
  styleUrl: './account-menu.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: {
    '(keydown.escape)': 'close(true)',
    '(document:click)': 'closeFromOutside($event)',
    '(focusout)': 'closeWhenLeft($event)',
  },
})
export class AccountMenu {
  readonly #host = inject<ElementRef<HTMLElement>>(ElementRef);
  readonly #router = inject(Router);
  readonly #confirm = inject(Confirm);
  readonly #keepings = inject(LocalKeepings);
  readonly #messages = inject(Messages);
  protected readonly openerElement = viewChild.required<ElementRef<HTMLButtonElement>>('opener');
  protected readonly session = inject(Session);
  protected readonly open = signal(false);

  /** For narrow screens, where the name of the shop needs the room. */
  protected readonly initials = computed(() => {
    const words = (this.session.person()?.name ?? '').split(/\s+/).filter(Boolean);
    const ends = [words.at(0), words.length > 1 ? words.at(-1) : undefined];
    return ends.map((word) => [...(word ?? '')][0] ?? '').join('');
  });

  protected readonly others = computed(() => {
    const current = this.session.membership()?.id;
    return this.session
      .memberships()
      .filter(({ id }) => id !== current)
      .map((one) => ({
        id: one.id,
        text: `${one.clientName ?? one.shopName ?? 'Tumblewright'}, ${wordFor(one.role)}`,
      }));
  });

  protected close(refocus = false): void {
    if (!this.open()) return;
    this.open.set(false);
    if (refocus) this.openerElement().nativeElement.focus();
  }

  protected closeFromOutside(event: Event): void {
    if (!this.#host.nativeElement.contains(event.target as Node)) this.close();
  }

  protected closeWhenLeft(event: FocusEvent): void {
    const to = event.relatedTarget as Node | null;
    if (to && !this.#host.nativeElement.contains(to)) this.close();
  }

  protected async goOnAs(membershipId: string): Promise<void> {
    this.close();
    const before = this.#router.url;
    // The page is left before the switch: it may hold what is not saved yet, and the same page would
    // go on showing the other one's stores and balances, since the router keeps it where it can.
    const left = await this.#router.navigateByUrl('/memberships', { skipLocationChange: true });
    if (left === false) return;
    try {
      await this.session.switchTo(membershipId);
      await this.#router.navigateByUrl('/', { onSameUrlNavigation: 'reload' });
    } catch (error) {
      await this.#router.navigateByUrl(before, { onSameUrlNavigation: 'reload' });
      this.#messages.say(problemText(error));
    }
  }

  protected async signOut(): Promise<void> {
    this.close();
    const losses = await this.#keepings.losses();
    const agreed =
      losses.length === 0 ||
      (await this.#confirm.ask({
        heading: 'Sign out on this device?',
        consequence: losses.join(' '),
        action: 'Sign out and lose it',
        stay: 'Stay signed in',
        destructive: true,
      }));
    if (!agreed) return;
    try {
      await this.session.signOut();
      await this.#router.navigateByUrl('/sign-in');
    } catch {
      this.#messages.say('You are still signed in: there was no answer. Try again when connected.');
    }
  }
}
