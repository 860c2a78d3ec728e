import { type Operation } from './operation';
import { operations } from './operations';
import { permissions, permissionsOf, reachOf, roles } from './permissions';

describe('the authorization table', () => {
  it('shows an attendant no money, no prices, no contract and nobody’s mail address', () => {
    expect(permissionsOf('attendant')).toEqual([
      'clients.read',
      'machines.read',
      'calls.read',
      'calls.report',
      'visits.read',
      'files.read',
      'files.add',
      'live.follow',
    ]);
    for (const permission of permissionsOf('attendant')) {
      expect(reachOf('attendant', permission)).toBe('store');
    }
  });

  it('lets client owners see their own money and pay it, and change nothing of the shop', () => {
    const may = permissionsOf('client_owner');
    for (const permission of ['statements.read', 'payments.read', 'payments.pay', 'tickets.read']) {
      expect(may).toContain(permission);
    }
    expect(may.filter((p) => /change|manage|decide|close|record|plan|sign_off/.test(p))).toEqual(
      [],
    );
    for (const permission of may) expect(reachOf('client_owner', permission)).toBe('client');
  });

  it('keeps a tech from prices, statements, rulings and the crew', () => {
    const may = permissionsOf('tech');
    for (const word of ['change', 'manage', 'decide', 'close', 'sign_off']) {
      expect(may.filter((p) => p.endsWith(word) && p !== 'machines.change')).toEqual([]);
    }
    expect(may.some((p) => p.startsWith('statements') || p.startsWith('payments'))).toBe(false);
    expect(may.some((p) => p.startsWith('ledger') || p.startsWith('rulings'))).toBe(false);
  });

  it('leaves to the owner alone what binds the shop', () => {
    for (const permission of [
      'settings.change',
      'crew.manage',
      'prices.change',
      'rulings.decide',
      'subscription.change',
      'audit.read',
    ] as const) {
      expect(roles.filter((role) => reachOf(role, permission))).toEqual(['shop_owner']);
    }
  });

  it('keeps the platform admin out of every shop, and every shop out of the platform area', () => {
    expect(permissionsOf('platform_admin')).toEqual(['platform.read', 'platform.change']);
    for (const role of roles.filter((r) => r !== 'platform_admin')) {
      expect(permissionsOf(role).filter((p) => p.startsWith('platform.'))).toEqual([]);
    }
  });

  it('is the only place operations name their permission from', () => {
    for (const operation of Object.values(operations) as Operation[]) {
      const known = ['public', 'signed-in', ...Object.keys(permissions)];
      expect([operation.id, known.includes(operation.permission)]).toEqual([operation.id, true]);
    }
  });

  it('opens to the public only what stands before a session, or checks its sender otherwise', () => {
    const open = (Object.values(operations) as Operation[])
      .filter((operation) => operation.permission === 'public')
      .map((operation) => operation.id);
    expect(open.sort()).toEqual(expect.arrayContaining(['session.signIn', 'account.reset']));
    // Adding one here is a decision: it is reached by anybody on the network.
    expect(open.length).toBeLessThanOrEqual(14);
  });
});
