import { type Context } from '../../core/context';
import { type ListKind } from './columns';
import { machinesPlanner } from './plan-machines';
import { partsPlanner } from './plan-parts';
import { storesPlanner } from './plan-stores';
import { type Planner } from './planned-row';
import { type TableRow } from './read-table';

/** Plans the rows of a file of each kind, against what stands when it is asked for. */
export const planners: Record<ListKind, (context: Context, table: TableRow[]) => Promise<Planner>> =
  {
    stores: storesPlanner,
    machines: machinesPlanner,
    parts: partsPlanner,
  };
