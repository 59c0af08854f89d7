import * as z from 'zod';
import type { RouteDescriptor } from '../../contract';

const MEDIA_TYPES: Record<string, string> = {
  bytes: 'application/octet-stream',
  csv: 'text/csv',
  vtt: 'text/vtt',
  zip: 'application/zip',
  'event-stream': 'text/event-stream',
  text: 'text/plain',
};

const schemaOf = (schema: z.ZodType, io: 'input' | 'output') => {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
  return rest;
};

function parametersOf(descriptor: RouteDescriptor): unknown[] {
  const fields = (schema: z.ZodType | undefined, place: 'path' | 'query') => {
    if (!schema) return [];
    const json = schemaOf(schema, 'input');
    const required = new Set(json.required ?? []);
    return Object.entries(json.properties ?? {}).map(([name, property]) => ({
      name,
      in: place,
      required: place === 'path' || required.has(name),
      schema: property,
    }));
  };
  const key = descriptor.creates
    ? [{ name: 'Idempotency-Key', in: 'header', required: false, schema: { type: 'string' } }]
    : [];
  return [...fields(descriptor.params, 'path'), ...fields(descriptor.query, 'query'), ...key];
}

function bodyOf(descriptor: RouteDescriptor): unknown {
  if (descriptor.upload) {
    const schema = {
      type: 'object',
      required: ['file'],
      properties: { file: { type: 'string', format: 'binary' } },
    };
    return { required: true, content: { 'multipart/form-data': { schema } } };
  }
  if (!descriptor.body) return undefined;
  return { required: true, content: { 'application/json': { schema: schemaOf(descriptor.body, 'input') } } };
}

function successOf(descriptor: RouteDescriptor): unknown {
  if (descriptor.answer)
    return {
      description: descriptor.summary,
      content: { 'application/json': { schema: schemaOf(descriptor.answer, 'output') } },
    };
  const mediaType = MEDIA_TYPES[descriptor.produces];
  return mediaType
    ? { description: descriptor.summary, content: { [mediaType]: {} } }
    : { description: descriptor.summary };
}

/** The OpenAPI 3.1 document of the registered routes; `x-roles` says who may call each. */
export function describeApi(
  descriptors: readonly RouteDescriptor[],
  version: string,
): Record<string, unknown> {
  const paths: Record<string, Record<string, unknown>> = {};
  for (const descriptor of descriptors) {
    const path = descriptor.path.replace(/:(\w+)/g, '{$1}');
    paths[path] = {
      ...paths[path],
      [descriptor.method]: {
        operationId: descriptor.id,
        summary: descriptor.summary,
        'x-roles': descriptor.access,
        security: descriptor.access === 'anyone' ? [] : [{ session: [] }],
        parameters: parametersOf(descriptor),
        requestBody: bodyOf(descriptor),
        responses: {
          [descriptor.status]: successOf(descriptor),
          default: {
            description: 'A problem',
            content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
          },
        },
      },
    };
  }
  const problem = {
    type: 'object',
    required: ['type', 'title', 'status', 'detail'],
    properties: {
      type: { type: 'string' },
      title: { type: 'string' },
      status: { type: 'integer' },
      detail: { type: 'string' },
      errors: {
        type: 'array',
        items: { type: 'object', properties: { path: { type: 'string' }, message: { type: 'string' } } },
      },
    },
  };
  return {
    openapi: '3.1.0',
    info: {
      title: 'Midfoot',
      version,
      description:
        'State-changing calls need the cookie XSRF-TOKEN and its value in the header X-XSRF-TOKEN.',
    },
    paths,
    components: {
      schemas: { Problem: problem },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'mf_access' } },
    },
  };
}
