import { operations, permissions } from '@lib/contracts';
import { type Route } from './route';

/** Stops the start-up when an operation has no handler or two, or names no known permission. */
export function checkRoutes(routes: readonly Route[]): void {
  const wrong: string[] = [];
  const handled = new Map<string, number>();
  for (const { operation } of routes) {
    handled.set(operation.id, (handled.get(operation.id) ?? 0) + 1);
    const { permission } = operation;
    const known =
      permission === 'public' || permission === 'signed-in' || permission in permissions;
    if (!known) wrong.push(`${operation.id} names no permission of the table`);
  }
  for (const id of Object.keys(operations)) {
    const times = handled.get(id) ?? 0;
    if (times !== 1) wrong.push(`${id} has ${times} handlers`);
  }
  if (wrong.length) throw new Error(`The routes are not complete: ${wrong.join('; ')}.`);
}
