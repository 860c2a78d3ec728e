import { type BrowserContext, type BrowserContextOptions, test as base } from '@playwright/test';
import { Visitor } from './visitor';
import { type Works, worksOf } from './works';

interface Fixtures {
  /** The shop to work in; other projects have others. */
  works: Works;
  /** The shop whose subscription may be changed. */
  pausable: Works;
  /** Lets somebody in, each with a browser of their own; with an address, signed in. */
  visitor(email?: string, options?: BrowserContextOptions): Promise<Visitor>;
}

/** What keeps the field area working without a signal; elsewhere it only loads everything twice. */
export const worksOffline: BrowserContextOptions = { serviceWorkers: 'allow' };

export const test = base.extend<Fixtures>({
  works: async ({}, use, { project }) => use(worksOf(project.name, 'work')),
  pausable: async ({}, use, { project }) => use(worksOf(project.name, 'subscription')),
  visitor: async ({ browser }, use) => {
    const contexts: BrowserContext[] = [];
    await use(async (email, options) => {
      const context = await browser.newContext(options);
      contexts.push(context);
      const visitor = new Visitor(await context.newPage());
      if (email !== undefined) await visitor.signIn(email);
      return visitor;
    });
    await Promise.all(contexts.map((context) => context.close()));
  },
});

export { expect } from '@playwright/test';
