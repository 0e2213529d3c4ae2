import { accountEndpoints } from './account';
import { batchEndpoints } from './batches';
import { bottleEndpoints } from './bottles';
import { lotEndpoints, movementEndpoints } from './lots';
import { needEndpoints } from './needs';
import { placeEndpoints } from './places';
import type { Endpoint } from './endpoint';
import { dataSheetEndpoints } from './data-sheets';
import { budgetEndpoints } from './budgets';
import { demonstrationEndpoints } from './demonstrations';
import { houseEndpoints } from './house';
import { labSessionEndpoints } from './lab-sessions';
import { mixEndpoints } from './mixes';
import { offerEndpoints } from './offers';
import { orderEndpoints } from './orders';
import { outboxEndpoints } from './outbox';
import { paymentEndpoints } from './payments';
import { recordEndpoints } from './records';
import { requestEndpoints } from './requests';
import { reviewEndpoints } from './reviews';
import { searchEndpoints } from './search';
import { shortageEndpoints } from './shortages';
import { solutionEndpoints } from './solutions';
import { substanceEndpoints } from './substances';
import { userEndpoints } from './users';

/** Every call of the interface. A route that is missing here fails a test. */
export const ALL_ENDPOINTS: readonly Endpoint[] = [
  accountEndpoints,
  dataSheetEndpoints,
  demonstrationEndpoints,
  houseEndpoints,
  labSessionEndpoints,
  mixEndpoints,
  orderEndpoints,
  offerEndpoints,
  budgetEndpoints,
  paymentEndpoints,
  shortageEndpoints,
  outboxEndpoints,
  recordEndpoints,
  requestEndpoints,
  reviewEndpoints,
  searchEndpoints,
  solutionEndpoints,
  substanceEndpoints,
  userEndpoints,
  batchEndpoints,
  bottleEndpoints,
  lotEndpoints,
  movementEndpoints,
  needEndpoints,
  placeEndpoints,
].flatMap((group) => Object.values<Endpoint>(group));
