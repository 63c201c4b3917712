import { z } from 'zod';
import { type Endpoint, errorSchema } from '@/api/endpoint.ts';
import { endpoints } from '@/api/endpoints.ts';
import { programVersion } from '../version.ts';

type Json = Record<string, unknown>;

/** The OpenAPI 3.1 description of the interface, made from the endpoint table. */
export function openApiDocument(): Json {
  const paths: Record<string, Json> = {};
  for (const [operationId, endpoint] of Object.entries(endpoints) as [string, Endpoint][]) {
    const path = endpoint.path.replace(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [endpoint.method.toLowerCase()]: operation(operationId, endpoint) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Blockwright',
      version: programVersion,
      description: 'From block designs to error-correcting codes a team can defend.',
    },
    servers: [{ url: '/api/v1' }],
    paths,
    components: {
      schemas: { Error: jsonSchema(errorSchema, 'output') },
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: 'authjs.session-token', description: "A browser's session." },
        token: { type: 'http', scheme: 'bearer', description: tokenDescription },
      },
    },
    security: [{ session: [] }],
  };
}

const tokenDescription =
  'An API token of an account page, sent as `Authorization: Bearer <token>`. Beside each operation stand the scopes of ' +
  'which a token needs one; an operation that names none takes a session only.';

/** A session always opens it; a token with any one of the endpoint's scopes does too. */
const security = ({ scopes }: Endpoint): Json[] => [{ session: [] }, ...scopes.map((scope) => ({ token: [scope] }))];

function operation(operationId: string, endpoint: Endpoint): Json {
  const body = jsonSchema(endpoint.body, 'input');
  return {
    operationId,
    summary: endpoint.summary,
    security: security(endpoint),
    parameters: [...pathParameters(endpoint.path), ...queryParameters(endpoint.query)],
    ...(hasContent(body) && { requestBody: { required: true, content: { 'application/json': { schema: body } } } }),
    ...(endpoint.takes === 'file' && { requestBody: { required: true, content: aFile } }),
    responses: { ...successes(endpoint), default: refused },
  };
}

const aFile = { 'application/octet-stream': { schema: { type: 'string', format: 'binary' } } };

const refused = {
  description: 'Refused; `fields` names each bad field and what is accepted.',
  content: { 'application/json': { schema: { $ref: '#/components/schemas/Error' } } },
};

function successes(endpoint: Endpoint): Json {
  const schema = jsonSchema(endpoint.response, 'output');
  const json = hasContent(schema) ? { 'application/json': { schema } } : undefined;
  const content = json || fileTypes[endpoint.path] ? { ...json, ...fileTypes[endpoint.path] } : undefined;
  return Object.fromEntries(
    endpoint.success.map((status) => [status, { description: endpoint.summary, ...(content && { content }) }]),
  );
}

/** Addresses that answer with something else than JSON. */
const fileTypes: Record<string, Json> = {
  '/runs/:id/events': { 'text/event-stream': { schema: { type: 'string' } } },
  '/notices/events': { 'text/event-stream': { schema: { type: 'string' } } },
  ...Object.fromEntries(
    ['/codes/:id/blocks', '/codes/:id/generator', '/codes/:id/vectors', '/releases/:id/files/:name'].map((path) => [
      path,
      aFile,
    ]),
  ),
  '/runs/:id/points': { 'text/csv': { schema: { type: 'string' } } },
  '/codes/:id/matrix': aFile,
};

const pathParameters = (path: string): Json[] =>
  [...path.matchAll(/:(\w+)/g)].map(([, name]) => ({
    name,
    in: 'path',
    required: true,
    schema: { type: 'string' },
  }));

function queryParameters(query: z.ZodType): Json[] {
  const schema = jsonSchema(query, 'input');
  const required = (schema.required ?? []) as string[];
  return Object.entries((schema.properties ?? {}) as Record<string, Json>).map(([name, inner]) => ({
    name,
    in: 'query',
    required: required.includes(name),
    schema: inner,
  }));
}

const hasContent = (schema: Json): boolean =>
  Object.keys((schema.properties ?? {}) as Json).length > 0 || 'anyOf' in schema || 'oneOf' in schema;

function jsonSchema(schema: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
  return rest;
}
