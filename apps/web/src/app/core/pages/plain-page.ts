import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** A page that stands alone: sign-in and its kin, and pages that say why there is no other. */
@Component({
  selector: 'tw-plain-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <header><a href="/">Tumblewright</a></header>
    <main id="main" tabindex="-1">
      <h1 tabindex="-1">{{ heading() }}</h1>
      <ng-content />
    </main>
  `,
  styles: `
    :host {
      display: block;
      min-block-size: 100dvh;
      padding: 1rem;
      border-block-start: 0.375rem solid var(--tw-edge-white);
    }
    header,
    main {
      max-inline-size: 26rem;
      margin-inline: auto;
    }
    header {
      padding-block: 0.5rem 1.5rem;
    }
    header a {
      display: inline-flex;
      align-items: center;
      gap: 0.5rem;
      min-block-size: 2.75rem;
      color: var(--tw-ink);
      font-weight: 600;
      text-decoration: none;
    }
    header a::before {
      content: '';
      inline-size: 1.125rem;
      block-size: 1.125rem;
      border: 3px solid var(--tw-carbon);
      border-radius: 50%;
    }
    main {
      padding: 1.5rem;
      border: 1px solid var(--tw-hairline);
      border-radius: var(--tw-corner);
      background: var(--tw-sheet);
    }
    main:focus {
      outline: none;
    }
    h1 {
      margin-block-end: 1rem;
    }
    @media (max-width: 30rem) {
      main {
        padding: 1rem;
      }
    }
    @media (min-width: 60rem) {
      header {
        padding-block-start: 3rem;
      }
    }
  `,
})
export class PlainPage {
  readonly heading = input.required<string>();
}
