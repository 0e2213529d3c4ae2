import { route } from '@/lib/http/route';
import { placeEndpoints } from '@/lib/schemas/places';
import { listPlaces } from '@/lib/services/places';

export const GET = route(placeEndpoints.list, ({ viewer }) => listPlaces(viewer));
