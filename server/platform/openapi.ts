// The API described from the schemas it runs on, as OpenAPI 3.1.
import {
  extendZodWithOpenApi,
  OpenAPIRegistry,
  OpenApiGeneratorV31,
  type RouteConfig,
} from '@asteasolutions/zod-to-openapi';
import { Router } from 'express';
import { z } from 'zod';

// Before any schema is registered; schemas made earlier are met through their public shape.
extendZodWithOpenApi(z);

export type Described = Pick<RouteConfig, 'method' | 'path' | 'summary'> & {
  operationId: string;
  tag: string;
  isStaff?: boolean;
  params?: z.ZodObject;
  query?: z.ZodObject;
  body?: z.ZodType;
  answer?: z.ZodType;
  answerType?: string;
};

const JSON_TYPE = 'application/json';

/** Builds the document from what each room says of its own endpoints. */
export function describeApi(
  endpoints: readonly Described[],
  problem: z.ZodType,
): ReturnType<OpenApiGeneratorV31['generateDocument']> {
  const registry = new OpenAPIRegistry();
  registry.registerComponent('securitySchemes', 'desk', {
    type: 'apiKey',
    in: 'cookie',
    name: 'treenail',
    description:
      'The desk’s session, together with the header X-Treenail-Token on whatever changes something.',
  });
  const problems = { 'application/problem+json': { schema: problem } };
  for (const one of endpoints) {
    registry.registerPath({
      method: one.method,
      path: one.path,
      operationId: one.operationId,
      ...(one.summary !== undefined && { summary: one.summary }),
      tags: [one.tag],
      security: one.isStaff ? [{ desk: [] }] : [],
      request: {
        ...(one.params && { params: one.params }),
        ...(one.query && { query: one.query }),
        ...(one.body && { body: { required: true, content: { [JSON_TYPE]: { schema: one.body } } } }),
      },
      responses: {
        200: {
          description: 'Done.',
          ...(one.answer && { content: { [one.answerType ?? JSON_TYPE]: { schema: one.answer } } }),
        },
        default: { description: 'A problem, after RFC 9457.', content: problems },
      },
    });
  }
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: {
      title: 'Treenail',
      version: '1',
      description: 'Every peg holds. Sums are whole pence, days are days in London.',
    },
  });
}

export function createOpenApiRouter(document: object): Router {
  const router = Router();
  router.get('/', (_req, res) => {
    res.setHeader('Cache-Control', 'public, max-age=300');
    res.json(document);
  });
  return router;
}
