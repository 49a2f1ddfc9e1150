import { z } from 'zod';
import { engineVersion } from '#app/physics/model/engine-version.ts';
import {
  clearSkyAnswerSchema, clearSkyQuerySchema, computationAnswerSchema, problemSchema, queuedAnswerSchema, sunAnswerSchema, sunQuerySchema,
} from './api-contract.ts';
import { reconstructionResultSchema } from './reconstruction-result-schema.ts';
import { reconstructionSchema } from './reconstruction-schema.ts';
import { recurrenceAnswerSchema, recurrenceSchema } from './recurrence-request.ts';

/** The OpenAPI document, made from the same Zod schemas that check requests. */

interface Endpoint {
  readonly path: string;
  readonly summary: string;
  readonly description: string;
  readonly query?: z.ZodObject;
  readonly body?: z.ZodType;
  readonly answer: z.ZodType;
  /** Answer of a long run, with `Location` naming its address. */
  readonly later?: z.ZodType;
}

const endpoints: readonly Endpoint[] = [
  {
    path: '/api/v1/sun',
    summary: 'Position of the sun',
    description: 'After Reda and Andreas, NREL/TP-560-34302, with the refraction given there for the pressure and temperature.',
    query: sunQuerySchema,
    answer: sunAnswerSchema,
  },
  {
    path: '/api/v1/clear-sky',
    summary: 'Direct irradiance under a clear sky',
    description: 'Bird and Hulstrom 1981 and Ineichen and Perez 2002 with the median air of a class, and the clean-air bound. No forecast and no measurement.',
    query: clearSkyQuerySchema,
    answer: clearSkyAnswerSchema,
  },
  {
    path: '/api/v1/reconstructions',
    summary: 'Reconstruct one incident',
    description: 'The same input as `npm run reconstruct`. A short run is computed at once and not stored. A long one, or one sent with `Prefer: respond-async`, is answered by 202 with the address of its result in `Location`; the same request sent again finds the same run. Estimates from the values entered: not a certificate, legal cause, or proof that a place is safe.',
    body: reconstructionSchema,
    answer: reconstructionResultSchema,
    later: queuedAnswerSchema,
  },
  {
    path: '/api/v1/reconstructions/{computationId}',
    summary: 'State, progress and result of a long run',
    description: 'Open to whoever asked for the run, for a week. `Retry-After` says when to ask again.',
    answer: computationAnswerSchema,
  },
  {
    path: '/api/v1/recurrence',
    summary: 'Days on which an alignment comes back',
    description: 'Either an optic with its mark, or a direction of the sun with a tolerance; a span of five years at most.',
    body: recurrenceSchema,
    answer: recurrenceAnswerSchema,
  },
];

const refusals = {
  '401': 'Not signed in, or the key has ended',
  '403': 'Not open to the roles of this person, or to this key',
  '405': 'Another method is asked for',
  '413': 'The body is too long',
  '415': 'The body is not application/json',
  '422': 'The request has fields to mend; `errors` lists them',
  '429': 'Too many requests; `Retry-After` says how long to wait',
} as const;

const schemaOf = (schema: z.ZodType, io: 'input' | 'output') => {
  const { $schema: _dialect, ...json } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
  return json;
};

function parametersOf(query: z.ZodObject) {
  return Object.entries(query.shape).map(([name, schema]) => ({
    name,
    in: 'query',
    required: !z.safeParse(schema, undefined).success,
    schema: schemaOf(z.object({ value: schema }), 'input').properties?.['value'] ?? {},
  }));
}

function operationOf(endpoint: Endpoint) {
  const names = [...endpoint.path.matchAll(/\{(\w+)\}/gu)].map((match) => match[1]);
  const problem = (description: string) => ({ description, content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } } });
  return {
    summary: endpoint.summary,
    description: endpoint.description,
    ...(endpoint.query ? { parameters: parametersOf(endpoint.query) } : {}),
    ...(names.length > 0 ? { parameters: names.map((name) => ({ name, in: 'path', required: true, schema: { type: 'string', format: 'uuid' } })) } : {}),
    ...(endpoint.body ? { requestBody: { required: true, content: { 'application/json': { schema: schemaOf(endpoint.body, 'input') } } } } : {}),
    responses: {
      '200': { description: 'Computed', content: { 'application/json': { schema: schemaOf(endpoint.answer, 'output') } } },
      ...(endpoint.later
        ? {
            '202': {
              description: 'Queued; the result will be at `Location`',
              headers: { Location: { schema: { type: 'string', format: 'uri-reference' } }, 'Retry-After': { description: 'Seconds', schema: { type: 'integer' } } },
              content: { 'application/json': { schema: schemaOf(endpoint.later, 'output') } },
            },
          }
        : {}),
      ...(names.length > 0 ? { '404': problem('No such run of this person') } : {}),
      ...Object.fromEntries(Object.entries(refusals).map(([status, description]) => [status, problem(description)])),
    },
  };
}

export function openApiDocument() {
  return {
    openapi: '3.1.0',
    jsonSchemaDialect: 'https://json-schema.org/draft/2020-12/schema',
    info: {
      title: 'Scorchline',
      version: engineVersion,
      description: 'Sun, sky and focused sunlight. Azimuths clockwise from true north, instants in UTC, names with their unit. Errors are problem details after RFC 9457.',
    },
    security: [{ session: [] }, { key: [] }],
    paths: Object.fromEntries(endpoints.map((endpoint) => [endpoint.path, { [endpoint.body ? 'post' : 'get']: operationOf(endpoint) }])),
    components: {
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'scorchline_session', description: 'Set by signing in.' }, key: { type: 'http', scheme: 'bearer', description: 'A key made on the page “Your account”, to look up or to compute.' } },
      schemas: { Problem: schemaOf(problemSchema, 'output') },
    },
  };
}
