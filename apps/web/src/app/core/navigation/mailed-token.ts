import { Location } from '@angular/common';
import { inject } from '@angular/core';
import { ActivatedRoute } from '@angular/router';

/**
 * The secret of a mailed link, `/verify-email#token=...` (or `?token=...`), taken out of the address
 * bar so that it is not left in the history or in a picture of the screen. Call it where injection
 * is possible.
 */
export function mailedToken(): string {
  const { fragment, queryParamMap } = inject(ActivatedRoute).snapshot;
  const token = new URLSearchParams(fragment ?? '').get('token') ?? queryParamMap.get('token');
  const location = inject(Location);
  if (token) location.replaceState(location.path().split(/[?#]/)[0] ?? '');
  return token ?? '';
}
