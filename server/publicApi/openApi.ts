import { OpenApiGeneratorV31, OpenAPIRegistry } from '@asteasolutions/zod-to-openapi';

import { errorBodySchema } from '@/lib/contract/errors';
import packageJson from '@/package.json';

import { csvHeader } from '../publicView/releaseFields';
import { endpoints } from './endpoints';

const errors = {
  404: 'There is nothing at this address.',
  422: 'A parameter is not one that is offered; `fields` says which.',
  429: 'Too many requests; the header RateLimit says when to go on.',
};

let known: object | undefined;

/** The description of the public API (OpenAPI 3.1), from the schemas that its answers pass through. */
export function openApiDocument(): object {
  known ??= describe();
  return known;
}

function describe(): object {
  const registry = new OpenAPIRegistry();
  for (const { path, name, summary, example, params, query, response } of endpoints) {
    const hasCsv = name === 'listChecks';
    registry.registerPath({
      ...{ method: 'get', path, operationId: name, summary, 'x-example': example },
      request: { params, query },
      responses: {
        200: {
          description: summary,
          content: {
            'application/json': { schema: response },
            ...(hasCsv ? { 'text/csv': { schema: { type: 'string', examples: [`${csvHeader}\n`] } } } : {}),
          },
        },
        304: { description: 'Not changed since the ETag that was given.' },
        ...Object.fromEntries(
          Object.entries(errors).map(([status, description]) => [
            status,
            { description, content: { 'application/json': { schema: errorBodySchema } } },
          ]),
        ),
      },
    });
  }
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: {
      title: 'Ebbline public API',
      version: packageJson.version,
      description:
        'Measured fade of home storage banks. Read-only; every figure stands for at least 5 owners, and counts below 20 are ranges.',
      license: { name: 'CC BY 4.0', url: 'https://creativecommons.org/licenses/by/4.0/' },
    },
    servers: [{ url: '/api/v1' }],
  });
}
