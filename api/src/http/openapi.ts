import * as z from 'zod';
import { problem } from '@shared/contract';
import type { AnyRoute } from './route';

const json = (schema: unknown) => ({ 'application/json': { schema } });

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): unknown {
  return z.toJSONSchema(schema, { io, target: 'draft-2020-12', unrepresentable: 'any' });
}

/** OpenAPI 3.1 of the declared routes: the same objects that the router serves. */
export function openApi(routes: readonly AnyRoute[], version: string): object {
  const paths: Record<string, Record<string, unknown>> = {};
  for (const spec of routes) {
    const path = `/api${spec.path}`.replace(/:(\w+)/g, '{$1}');
    (paths[path] ??= {})[spec.method] = operation(spec);
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Dayberth', version, license: { name: 'MIT', identifier: 'MIT' } },
    paths,
    components: {
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'dayberth.sid' } },
      schemas: { Problem: schemaOf(problem, 'output') },
    },
  };
}

function operation(spec: AnyRoute): object {
  const success = String(spec.status ?? (spec.response || spec.textType ? 200 : 204));
  return {
    summary: spec.summary,
    'x-allow': spec.allow,
    ...(spec.allow === 'anyone' ? {} : { security: [{ session: [] }] }),
    parameters: [...parameters(spec.params, 'path'), ...parameters(spec.query, 'query')],
    ...(spec.body ? { requestBody: { required: true, content: json(schemaOf(spec.body, 'input')) } } : {}),
    responses: {
      [success]: {
        description: 'Done',
        ...(spec.response ? { content: json(schemaOf(spec.response, 'output')) } : {}),
        ...(spec.textType ? { content: { [spec.textType]: { schema: { type: 'string' } } } } : {}),
      },
      default: {
        description: 'A problem',
        content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
      },
    },
  };
}

function parameters(schema: z.ZodType | undefined, where: 'path' | 'query'): object[] {
  if (!schema) return [];
  const object = schemaOf(schema, 'input') as { properties?: Record<string, unknown>; required?: string[] };
  return Object.entries(object.properties ?? {}).map(([name, property]) => ({
    name,
    in: where,
    required: where === 'path' || (object.required ?? []).includes(name),
    schema: property,
  }));
}
