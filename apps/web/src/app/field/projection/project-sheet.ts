import { cautionsFor } from '@lib/domain/cautions/cautions';
import { type Sheet, type SheetJob, type SheetMachine } from '../kept/kept';
import { type Act, type ActKind, type PayloadOf } from '../outbox/local-act';

type JobShop = NonNullable<SheetJob['shop']>;
/** The part of the day's work this device knows more of than the server. */
type OwnAct = Pick<Act, 'kind' | 'at' | 'payload'>;
type Apply<K extends ActKind> = (sheet: Sheet, payload: PayloadOf<K>, of: Made) => Sheet;

interface Made {
  readonly at: string;
  readonly by: string;
}

/**
 * The visit as it stands with what was recorded on this device, whether or not the server has it
 * already. The server's own projection decides; this one only lets the tech see their entries at
 * once, so an act that fits nothing here changes nothing.
 */
export function projectSheet(sheet: Sheet, acts: readonly OwnAct[], by: string): Sheet {
  return acts.reduce((now, { kind, at, payload }) => {
    const apply = appliers[kind] as Apply<ActKind>;
    return apply(now, payload, { at, by });
  }, sheet);
}

const appliers: { [K in ActKind]: Apply<K> } = {
  arrived: (sheet, _, { at }) =>
    withVisit(started(sheet), { arrivedAt: sheet.visit.arrivedAt ?? at }),

  left: (sheet, _, { at }) => withVisit(sheet, { leftAt: at }),

  signed_off: (sheet) => withVisit(sheet, { state: 'completed' }),

  job_opened: (sheet, { jobId, machineId, callId, symptom }) => {
    const machine = sheet.machines.find(({ id }) => id === machineId);
    const open = sheet.jobs.some(({ id, machine: own }) => id === jobId || own.id === machineId);
    if (!machine || open) return sheet;
    const job = newJob(sheet, machine, {
      id: jobId,
      callId: callId ?? null,
      symptom: symptom ?? null,
    });
    return started({ ...sheet, jobs: [...sheet.jobs, job] });
  },

  job_dropped: (sheet, { jobId }) => ({
    ...sheet,
    jobs: sheet.jobs.filter(({ id }) => id !== jobId),
  }),

  cautions_ticked: (sheet, { jobId, cautions }, { at }) =>
    onShop(sheet, jobId, (shop, job) => {
      const ticked = [...new Set([...shop.cautions, ...cautions])];
      const all = cautionsFor(job.machine.kind, job.machine.energy).every(({ code }) =>
        ticked.includes(code),
      );
      return { ...shop, cautions: ticked, cautionsAt: shop.cautionsAt ?? (all ? at : null) };
    }),

  finding: (sheet, { jobId, words, code, category }) =>
    onJob(sheet, jobId, { finding: words, findingCode: code ?? null, category: category ?? null }),

  cause: (sheet, { jobId, cause }) => onJob(sheet, jobId, { cause }),

  action: (sheet, { jobId, words }) => onJob(sheet, jobId, { action: words }),

  minutes: (sheet, { jobId, minutes, afterHoursMinutes = 0, accessMinutes = 0 }) =>
    onShop(sheet, jobId, (shop) => ({ ...shop, minutes, afterHoursMinutes, accessMinutes })),

  part_used: (sheet, { jobId, partUseId, partId, description, quantityMilli = 1000, source }) =>
    changed(sheet, jobId, (job) => ({
      ...job,
      parts: [
        ...job.parts.filter(({ id }) => id !== partUseId),
        {
          id: partUseId,
          partId: partId ?? null,
          description: description ?? '',
          category: '',
          quantityMilli,
          source,
        },
      ],
    })),

  part_removed: (sheet, { jobId, partUseId }) =>
    changed(sheet, jobId, (job) => ({
      ...job,
      parts: job.parts.filter(({ id }) => id !== partUseId),
    })),

  test_cycle: (sheet, { jobId, cycles, coins, amount }) =>
    onJob(sheet, jobId, { testCycles: cycles, testCoins: coins, testAmount: amount }),

  // Photos are shown from where they are kept.
  photo: (sheet) => sheet,

  warranty_marked: (sheet, { jobId, mark, words = '', causedByJobId }, { by }) =>
    onShop(sheet, jobId, (shop) => ({
      ...shop,
      mark,
      markWords: words,
      markedBy: by,
      causedBy: causedByJobId ? causeOf(sheet, causedByJobId) : null,
    })),

  nothing_found: (sheet, { jobId, minutes, cycles, coins, amount = 0 }, { at }) =>
    left(
      changed(sheet, jobId, (job) => ({
        ...job,
        cause: 'nothing_found',
        testCycles: cycles,
        testCoins: coins,
        testAmount: amount,
        shop: job.shop && { ...job.shop, minutes },
      })),
      jobId,
      { result: 'nothing_found', machineState: 'up', doneAt: at },
    ),

  job_done: (sheet, { jobId, result, machineState }, { at }) =>
    left(sheet, jobId, { result, machineState, doneAt: at }),

  handed_over: (sheet, { openItemId, machineId, words }, { at }) => {
    if (sheet.openItems.some(({ id }) => id === openItemId)) return sheet;
    const machine = sheet.machines.find(({ id }) => id === machineId);
    const item = {
      id: openItemId,
      machine: machine ? { id: machine.id, bay: machine.bay } : null,
      words,
      visitId: sheet.visit.id,
      createdAt: at,
      doneAt: null,
    };
    return { ...sheet, openItems: [...sheet.openItems, item] };
  },

  open_item_done: (sheet, { openItemId }, { at }) => ({
    ...sheet,
    openItems: sheet.openItems.map((item) =>
      item.id === openItemId ? { ...item, doneAt: item.doneAt ?? at } : item,
    ),
  }),
};

function withVisit(sheet: Sheet, change: Partial<Sheet['visit']>): Sheet {
  return { ...sheet, visit: { ...sheet.visit, ...change } };
}

function started(sheet: Sheet): Sheet {
  const before = sheet.visit.state === 'planned' || sheet.visit.state === 'confirmed';
  return before ? withVisit(sheet, { state: 'in_process' }) : sheet;
}

function changed(sheet: Sheet, jobId: string, change: (job: SheetJob) => SheetJob): Sheet {
  return { ...sheet, jobs: sheet.jobs.map((job) => (job.id === jobId ? change(job) : job)) };
}

function onJob(sheet: Sheet, jobId: string, change: Partial<SheetJob>): Sheet {
  return changed(sheet, jobId, (job) => ({ ...job, ...change }));
}

function onShop(
  sheet: Sheet,
  jobId: string,
  change: (shop: JobShop, job: SheetJob) => JobShop,
): Sheet {
  return changed(sheet, jobId, (job) => ({ ...job, shop: job.shop && change(job.shop, job) }));
}

/** The job is done with, and the machine stands as it was left. */
function left(
  sheet: Sheet,
  jobId: string,
  how: Pick<SheetJob, 'result' | 'doneAt'> & { machineState: SheetMachine['state'] },
): Sheet {
  const machineId = sheet.jobs.find(({ id }) => id === jobId)?.machine.id;
  return {
    ...onJob(sheet, jobId, how),
    machines: sheet.machines.map((machine) =>
      machine.id === machineId ? { ...machine, state: how.machineState } : machine,
    ),
  };
}

function causeOf(sheet: Sheet, jobId: string): JobShop['causedBy'] {
  const earlier = sheet.earlierJobs.find((job) => job.jobId === jobId);
  if (earlier) return { jobId, reference: earlier.reference, words: earlier.action };
  const own = sheet.jobs.find(({ id }) => id === jobId);
  const reference = own ? `visit ${sheet.visit.number}/${own.position}` : 'an earlier job';
  return { jobId, reference, words: own?.action ?? '' };
}

function newJob(
  sheet: Sheet,
  { id, bay, kind, energy, make, model }: SheetMachine,
  opened: Pick<SheetJob, 'id' | 'callId' | 'symptom'>,
): SheetJob {
  return {
    ...opened,
    position: Math.max(0, ...sheet.jobs.map(({ position }) => position)) + 1,
    machine: { id, bay, kind, energy, make, model },
    finding: '',
    findingCode: null,
    category: null,
    cause: null,
    action: '',
    result: null,
    machineState: null,
    testCycles: 0,
    testCoins: 0,
    testAmount: 0,
    parts: [],
    photos: [],
    doneAt: null,
    shop: {
      minutes: 0,
      afterHoursMinutes: 0,
      accessMinutes: 0,
      cautions: [],
      cautionsAt: null,
      mark: 'none',
      markWords: '',
      markedBy: '',
      causedBy: null,
    },
  };
}
