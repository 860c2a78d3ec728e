import { inject, Injectable } from '@angular/core';
import { Title } from '@angular/platform-browser';
import {
  type ActivatedRouteSnapshot,
  type RouterStateSnapshot,
  TitleStrategy,
} from '@angular/router';

const product = 'Tumblewright';

/** "Foxglove Lane · Shop · Tumblewright": what is shown, in which area. */
@Injectable({ providedIn: 'root' })
export class Titles extends TitleStrategy {
  readonly #title = inject(Title);
  #area = '';

  override updateTitle(state: RouterStateSnapshot): void {
    this.#area = areaName(state.root);
    this.name(this.buildTitle(state) ?? '');
  }

  /** For pages whose name is known only once their content is: a store's, a ticket's. */
  name(page: string): void {
    this.#title.setTitle([page, this.#area, product].filter(Boolean).join(' · '));
  }
}

function areaName(route: ActivatedRouteSnapshot): string {
  let name = '';
  for (let at: ActivatedRouteSnapshot | null = route; at; at = at.firstChild) {
    name = (at.data['area'] as string | undefined) ?? name;
  }
  return name;
}
