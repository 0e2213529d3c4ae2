import { accountEndpoints } from './account';
import { batchEndpoints } from './batches';
import { bottleEndpoints } from './bottles';
import { lotEndpoints, movementEndpoints } from './lots';
import { needEndpoints } from './needs';
import { placeEndpoints } from './places';
import type { Endpoint } from './endpoint';
import { houseEndpoints } from './house';
import { outboxEndpoints } from './outbox';
import { recordEndpoints } from './records';
import { reviewEndpoints } from './reviews';
import { searchEndpoints } from './search';
import { userEndpoints } from './users';

/** Every call of the interface. A route that is missing here fails a test. */
export const ALL_ENDPOINTS: readonly Endpoint[] = [
  accountEndpoints,
  houseEndpoints,
  outboxEndpoints,
  recordEndpoints,
  reviewEndpoints,
  searchEndpoints,
  userEndpoints,
  batchEndpoints,
  bottleEndpoints,
  lotEndpoints,
  movementEndpoints,
  needEndpoints,
  placeEndpoints,
].flatMap((group) => Object.values<Endpoint>(group));
