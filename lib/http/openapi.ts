import 'server-only';
import { z } from 'zod';
import { ERRORS } from '@/lib/domain/errors';
import { POLICY } from '@/lib/domain/policy';
import { ALL_ENDPOINTS } from '@/lib/schemas/all-endpoints';
import type { Endpoint } from '@/lib/schemas/endpoint';

type Json = Record<string, unknown>;

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema: _version, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' }) as Json;
  return rest;
}

function parametersOf(schema: z.ZodType | undefined, place: 'path' | 'query'): Json[] {
  if (!schema) return [];
  const { properties = {}, required = [] } = schemaOf(schema, 'input') as {
    properties?: Json;
    required?: string[];
  };
  return Object.entries(properties).map(([name, property]) => ({
    name,
    in: place,
    required: place === 'path' || required.includes(name),
    schema: property,
  }));
}

function operationOf(endpoint: Endpoint): Json {
  const { response } = endpoint;
  const status = response === 'none' ? '204' : String(endpoint.status ?? 200);
  const content =
    response === 'none'
      ? {}
      : response === 'file'
        ? { content: { 'application/octet-stream': {} } }
        : { content: { 'application/json': { schema: schemaOf(response, 'output') } } };
  const isPublic = POLICY[endpoint.action].roles === 'anyone';
  return {
    operationId: `${endpoint.method.toLowerCase()}${endpoint.path.replaceAll(/[^a-z]+(\w)/gi, (_all, letter: string) => letter.toUpperCase()).replaceAll(/\W/g, '')}`,
    summary: endpoint.summary,
    ...(isPublic ? { security: [] } : {}),
    parameters: [...parametersOf(endpoint.params, 'path'), ...parametersOf(endpoint.query, 'query')],
    ...(endpoint.body
      ? {
          requestBody: {
            required: true,
            content: {
              [endpoint.takes === 'form' ? 'multipart/form-data' : 'application/json']: {
                schema: schemaOf(endpoint.body, 'input'),
              },
            },
          },
        }
      : {}),
    responses: {
      [status]: { description: 'Done', ...content },
      default: {
        description: 'A problem',
        content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
      },
    },
  };
}

/** The OpenAPI 3.1 document, made from the same declarations that check the calls. */
export function openApiDocument(): Json {
  const paths: Record<string, Json> = {};
  for (const endpoint of ALL_ENDPOINTS) {
    (paths[endpoint.path] ??= {})[endpoint.method.toLowerCase()] = operationOf(endpoint);
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Benchwright',
      version: '1',
      description: 'Amounts in mol, volumes in mL or L as the name says, temperatures in °C.',
    },
    security: [{ session: [] }],
    paths,
    components: {
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'benchwright_session' } },
      schemas: {
        Problem: {
          type: 'object',
          required: ['type', 'title', 'status'],
          properties: {
            type: { type: 'string', examples: Object.keys(ERRORS).map((code) => `/problems/${code}`) },
            title: { type: 'string' },
            status: { type: 'integer' },
            detail: { type: 'string' },
            errors: {
              type: 'array',
              items: {
                type: 'object',
                properties: { pointer: { type: 'string' }, detail: { type: 'string' } },
              },
            },
          },
        },
      },
    },
  };
}
