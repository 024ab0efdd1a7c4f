import { z } from 'zod';
import { problemSchema } from '#shared/contract/problem.ts';
import type { RouteDefinition } from '#shared/contract/route.ts';
import { apiPrefix, apiRoutes } from '#shared/contract/routes.ts';

type Json = Record<string, unknown>;

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
  return rest;
}

function parametersOf(definition: RouteDefinition): Json[] {
  const from = (place: 'path' | 'query', schema: z.ZodObject | undefined) =>
    Object.entries(schema?.shape ?? {}).map(([name, part]) => {
      const json = schemaOf(part as z.ZodType, 'input');
      const isRequired = place === 'path' || !(part as z.ZodType).safeParse(undefined).success;
      return {
        name,
        in: place,
        required: isRequired,
        schema: json,
        ...(typeof json['description'] === 'string' ? { description: json['description'] } : {}),
      };
    });
  const header = (name: string, description: string, required: boolean) => ({
    name,
    in: 'header',
    required,
    description,
    schema: { type: 'string' },
  });
  return [
    ...from('path', definition.params),
    ...from('query', definition.query),
    ...(definition.method === 'get' ? [] : [header('X-CSRF-Token', 'Token of the session', true)]),
    ...(definition.needsVersion === true ? [header('If-Match', 'Version that was read, in double quotes', true)] : []),
    ...(definition.isIdempotent === true ? [header('Idempotency-Key', 'Same key, same result', false)] : []),
  ];
}

function bodyOf(definition: RouteDefinition): Json {
  const file = { type: 'string', format: 'binary' };
  if (definition.accepts === 'multipart') {
    const options =
      definition.body === undefined
        ? {}
        : {
            options: {
              type: 'string',
              description: 'JSON of the options',
              contentMediaType: 'application/json',
              contentSchema: schemaOf(definition.body, 'input'),
            },
          };
    return {
      requestBody: {
        required: true,
        content: {
          'multipart/form-data': { schema: { type: 'object', properties: { ...options, file }, required: ['file'] } },
        },
      },
    };
  }
  if (definition.body === undefined) return {};
  return {
    requestBody: { required: true, content: { 'application/json': { schema: schemaOf(definition.body, 'input') } } },
  };
}

function successOf(definition: RouteDefinition): Json {
  if (definition.answers === 'file')
    return { description: 'The file', content: { '*/*': { schema: { type: 'string', format: 'binary' } } } };
  if (definition.response === null) return { description: 'Done' };
  const mediaType = definition.answers === 'events' ? 'text/event-stream' : 'application/json';
  return { description: 'Success', content: { [mediaType]: { schema: schemaOf(definition.response, 'output') } } };
}

function operationOf(name: string, definition: RouteDefinition): Json {
  const problem = {
    description: `Problem: ${definition.problems.join(', ')}`,
    content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
  };
  return {
    operationId: name,
    summary: definition.summary,
    'x-access': definition.access,
    parameters: parametersOf(definition),
    ...bodyOf(definition),
    responses: { [definition.status]: successOf(definition), default: problem },
  };
}

/** The OpenAPI 3.1 document of every route in the contract. */
export function openApiDocument(): Json {
  const paths: Record<string, Json> = {};
  for (const [name, definition] of Object.entries(apiRoutes)) {
    const path = `${apiPrefix}${definition.path.replace(/:(\w+)/g, '{$1}')}`;
    paths[path] = { ...paths[path], [definition.method]: operationOf(name, definition) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Stillspan',
      version: '1',
      description:
        'Assessment of overhead conductors for aeolian vibration and galloping. Quantities are in SI units; each name carries its unit.',
    },
    paths,
    components: {
      schemas: { Problem: schemaOf(problemSchema, 'output') },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'stillspan' } },
    },
    security: [{ session: [] }],
  };
}
