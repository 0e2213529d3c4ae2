import * as people from './20261201-01-people';
import * as places from './20261201-02-places';
import * as catalogue from './20261201-03-catalogue';
import * as requests from './20261201-04-requests';
import * as stock from './20261201-05-stock';
import * as batches from './20261201-06-batches';
import * as orders from './20261201-07-orders';
import * as waste from './20261201-08-waste';
import * as records from './20261201-09-records';

/** In the order they run. A new one goes at the end and is never edited once it has landed. */
export const ALL_MIGRATIONS = [
  { name: '20261201-01-people', ...people },
  { name: '20261201-02-places', ...places },
  { name: '20261201-03-catalogue', ...catalogue },
  { name: '20261201-04-requests', ...requests },
  { name: '20261201-05-stock', ...stock },
  { name: '20261201-06-batches', ...batches },
  { name: '20261201-07-orders', ...orders },
  { name: '20261201-08-waste', ...waste },
  { name: '20261201-09-records', ...records },
];
