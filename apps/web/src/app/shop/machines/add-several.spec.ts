import { TestBed } from '@angular/core/testing';
import { of, throwError } from 'rxjs';
import { StoresApi } from '../stores/stores-api';
import { AddSeveral, type Several } from './add-several';
import { MachinesApi } from './machines-api';

type Sent = { bayNumber: number; bankId: string; serial: string };

function world(refuse: (bay: number) => boolean) {
  const machines: { body: Sent; key: string }[] = [];
  const banks: string[] = [];
  TestBed.configureTestingModule({
    providers: [
      AddSeveral,
      {
        provide: StoresApi,
        useValue: {
          addBank: (_store: string, { letter }: { letter: string }) => {
            banks.push(letter);
            return of({ id: `bank-${letter}` });
          },
        },
      },
      {
        provide: MachinesApi,
        useValue: {
          create: (body: Sent, key: string) => {
            machines.push({ body, key });
            return refuse(body.bayNumber) ? throwError(() => new Error('limit')) : of(body);
          },
        },
      },
    ],
  });
  return { adding: TestBed.inject(AddSeveral), machines, banks };
}

const several: Several = {
  storeId: 's',
  bank: { letter: 'A', words: '' },
  bays: [1, 2, 3],
  serials: new Map([[2, 'K-2']]),
  machine: { kind: 'dryer' },
};

describe('AddSeveral', () => {
  it('adds the bank, then every machine in its bay with its serial number', async () => {
    const { adding, machines, banks } = world(() => false);
    expect(await adding.run(several)).toBe(3);
    expect(banks).toEqual(['A']);
    expect(machines.map(({ body }) => [body.bankId, body.bayNumber, body.serial])).toEqual([
      ['bank-A', 1, ''],
      ['bank-A', 2, 'K-2'],
      ['bank-A', 3, ''],
    ]);
    expect(new Set(machines.map(({ key }) => key)).size).toBe(3);
  });

  it('goes on where it was refused, under the same key, adding nothing twice', async () => {
    let full = true;
    const { adding, machines, banks } = world((bay) => full && bay === 2);
    await expect(adding.run(several)).rejects.toThrow('limit');
    expect(adding.standing()).toEqual([
      '1 of 3 stand already; adding again goes on with the rest.',
    ]);
    full = false;
    expect(await adding.run(several)).toBe(3);
    expect(banks).toEqual(['A']);
    expect(machines.map(({ body }) => body.bayNumber)).toEqual([1, 2, 2, 3]);
    expect(machines[1]?.key).toBe(machines[2]?.key);
  });
});
