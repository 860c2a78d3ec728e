import { type Route } from './core/http/route';

/** Every route of the API, a line a feature. */
export const routes: Route[] = [];
