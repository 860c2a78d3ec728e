import { DestroyRef, inject } from '@angular/core';
import { type CanDeactivateFn } from '@angular/router';
import { Confirm } from '../confirm/confirm';
import { Session } from '../session/session';

export interface HasChanges {
  hasChanges(): boolean;
}

/** Asks before a page with unsaved changes is left for another page of the application. */
export const keepsChanges: CanDeactivateFn<HasChanges> = (page) => {
  // A page whose content could not be loaded has no component to ask.
  if (!page?.hasChanges() || inject(Session).signedOut()) return true;
  return inject(Confirm).ask({
    heading: 'Leave without saving?',
    consequence: 'What you changed on this page has not been saved.',
    action: 'Leave',
    stay: 'Stay on the page',
    destructive: true,
  });
};

/** The same for closing or reloading the tab. Call it where injection is possible. */
export function warnBeforeUnload(hasChanges: () => boolean): void {
  const warn = (event: BeforeUnloadEvent) => {
    if (hasChanges()) event.preventDefault();
  };
  addEventListener('beforeunload', warn);
  inject(DestroyRef).onDestroy(() => removeEventListener('beforeunload', warn));
}
