import { z } from 'zod';
import { endpoint } from './endpoint';

export const houseEndpoints = {
  health: endpoint({
    method: 'GET',
    path: '/api/health',
    action: 'health:read',
    summary: 'Whether the server and its database answer',
    response: z.object({ ok: z.boolean(), version: z.string() }),
  }),
  openapi: endpoint({
    method: 'GET',
    path: '/api/openapi.json',
    action: 'health:read',
    summary: 'This interface, described',
    response: z.record(z.string(), z.unknown()),
  }),
};
