import { z } from 'zod';
import { engineVersion } from '#app/physics/model.ts';
import { clearSkyAnswerSchema, clearSkyQuerySchema, problemSchema, sunAnswerSchema, sunQuerySchema } from './api-contract.ts';
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
    description: 'The same input as `npm run reconstruct`. Computed at once, in 20 seconds at most; nothing is stored. Estimates from the values entered: not a certificate, legal cause, or proof that a place is safe.',
    body: reconstructionSchema,
    answer: reconstructionResultSchema,
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
  '401': 'Not signed in',
  '403': 'Not open to the roles of this person',
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
  const problem = (description: string) => ({ description, content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } } });
  return {
    summary: endpoint.summary,
    description: endpoint.description,
    ...(endpoint.query ? { parameters: parametersOf(endpoint.query) } : {}),
    ...(endpoint.body ? { requestBody: { required: true, content: { 'application/json': { schema: schemaOf(endpoint.body, 'input') } } } } : {}),
    responses: {
      '200': { description: 'Computed', content: { 'application/json': { schema: schemaOf(endpoint.answer, 'output') } } },
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
    security: [{ session: [] }],
    paths: Object.fromEntries(endpoints.map((endpoint) => [endpoint.path, { [endpoint.body ? 'post' : 'get']: operationOf(endpoint) }])),
    components: {
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'scorchline_session', description: 'Set by signing in.' } },
      schemas: { Problem: schemaOf(problemSchema, 'output') },
    },
  };
}
