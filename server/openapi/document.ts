import type { z } from 'zod';
import { LiveEvent, PROBLEM_KINDS, ProblemDetails, type Audience, type Endpoint } from '@common/contract';
import { JsonSchemas, type JsonSchema } from './json-schemas';
import type { OtherRoute } from './other-routes';

/** An operation of the document, as far as it is read here again. */
export interface Operation {
  readonly operationId: string;
  readonly tags: readonly string[];
  readonly summary: string;
  readonly description: string;
  readonly security: readonly Readonly<Record<string, readonly string[]>>[];
  readonly parameters?: readonly ParameterObject[];
  readonly requestBody?: { readonly required: boolean; readonly content: Content };
  readonly responses: Readonly<Record<string, ResponseObject | { readonly $ref: string }>>;
}

export interface ParameterObject {
  readonly name: string;
  readonly in: 'path' | 'query' | 'header';
  readonly required: boolean;
  readonly description?: string;
  readonly schema: JsonSchema;
}

export interface ResponseObject {
  readonly description: string;
  readonly content?: Content;
}

type Content = Readonly<Record<string, { readonly schema: JsonSchema }>>;

/** An OpenAPI 3.1 document. */
export interface OpenApiDocument {
  readonly openapi: '3.1.0';
  readonly info: { readonly title: string; readonly version: string; readonly description: string };
  readonly servers: readonly { readonly url: string }[];
  readonly tags: readonly { readonly name: string }[];
  readonly paths: Readonly<Record<string, Readonly<Record<string, Operation>>>>;
  readonly components: Readonly<Record<string, Readonly<Record<string, unknown>>>>;
}

const PROBLEM_RESPONSES = {
  '401': 'Nobody is signed in',
  '403': 'The role does not allow it, or the request does not come from our own page',
  '404': 'There is no such record, or none that the caller may know of',
  '422': 'Something in the request is not right; `errors` says what and where',
  '429': 'Too many requests',
  default: 'Any other problem',
} as const;

const DESCRIPTION = [
  'What the client of Fettle itself uses. Signing in gives a session cookie; whatever changes something sends the session’s',
  '`formToken` back in `X-Fettle-Token`. Problems are RFC 9457 problem details. A record that is changed carries its `version`:',
  'sent back with a change, it keeps one person from overwriting another. Absent members stay as they are; null clears.',
].join(' ');

/** The API as OpenAPI 3.1: the contract's routes by name, and those beside it. */
export function openApiDocument(
  endpoints: Readonly<Record<string, Endpoint>>,
  otherRoutes: readonly OtherRoute[],
): OpenApiDocument {
  const schemas = new JsonSchemas();
  const paths: Record<string, Record<string, Operation>> = {};
  const add = (path: string, method: string, operation: Operation): void => {
    (paths[path] ??= {})[method] = operation;
  };
  for (const [name, endpoint] of Object.entries(endpoints)) {
    add(
      endpoint.path.replace(/:(\w+)/g, '{$1}'),
      endpoint.method.toLowerCase(),
      contractOperation(name, endpoint, schemas),
    );
  }
  for (const route of otherRoutes) add(route.path, route.method, otherOperation(route));
  const tags = new Set(
    Object.values(paths).flatMap((methods) => Object.values(methods).flatMap(({ tags: own }) => own)),
  );
  return {
    openapi: '3.1.0',
    info: { title: 'Fettle', version: '1', description: DESCRIPTION },
    servers: [{ url: '/' }],
    tags: [...tags].sort().map((name) => ({ name })),
    paths: Object.fromEntries(Object.entries(paths).sort(([a], [b]) => (a < b ? -1 : 1))),
    components: components(schemas, paths),
  };
}

function contractOperation(name: string, endpoint: Endpoint, schemas: JsonSchemas): Operation {
  const isOpen = endpoint.who === 'anyone';
  const changes = endpoint.method !== 'GET';
  const parameters = [
    ...parametersOf(endpoint.params, 'path', schemas),
    ...parametersOf(endpoint.query, 'query', schemas),
  ];
  const takesBody = changes && !endpoint.body.safeParse(undefined).success;
  return {
    operationId: name,
    tags: [tagOf(endpoint.path)],
    summary: endpoint.summary,
    description: sayAudience(endpoint.who),
    security: changes ? [{ session: [], formToken: [] }] : isOpen ? [] : [{ session: [] }],
    ...(parameters.length > 0 && { parameters }),
    ...(takesBody && {
      requestBody: { required: true, content: { 'application/json': { schema: schemas.of(endpoint.body, 'input') } } },
    }),
    responses: {
      [String(endpoint.status)]:
        endpoint.status === 204
          ? { description: 'Done' }
          : {
              description: endpoint.status === 202 ? 'Begun' : 'Done',
              content: { 'application/json': { schema: schemas.of(endpoint.response, 'output') } },
            },
      ...problems([
        ...(isOpen ? [] : (['401'] as const)),
        ...(changes || !isOpen ? (['403'] as const) : []),
        ...(parameters.some((parameter) => parameter.in === 'path') ? (['404'] as const) : []),
        ...(takesBody || parameters.some((parameter) => parameter.in === 'query') ? (['422'] as const) : []),
        '429',
        'default',
      ]),
    },
  };
}

function otherOperation(route: OtherRoute): Operation {
  const text = { type: 'string' } as const;
  const parameters = route.parameters.map((parameter) => ({
    ...parameter,
    required: parameter.in === 'path',
    schema: text,
  }));
  const answers = route.answers.map(({ status, type, description }) => [
    String(status),
    type === null
      ? { description }
      : { description, content: { [type]: { schema: type === 'application/json' ? { type: 'object' } : text } } },
  ]);
  return {
    operationId: route.name,
    tags: [route.tag],
    summary: route.summary,
    description: route.who === 'anyone' ? sayAudience('anyone') : 'For everybody who is signed in.',
    security: route.who === 'anyone' ? [] : [{ session: [] }],
    ...(parameters.length > 0 && { parameters }),
    responses: {
      ...(Object.fromEntries(answers) as Record<string, ResponseObject>),
      ...problems([...(route.who === 'anyone' ? [] : (['401'] as const)), '429', 'default']),
    },
  };
}

function parametersOf(schema: z.ZodType, place: 'path' | 'query', schemas: JsonSchemas): readonly ParameterObject[] {
  const { properties, required } = schemas.shapeOf(schema, 'input') as {
    readonly properties?: Readonly<Record<string, JsonSchema>>;
    readonly required?: readonly string[];
  };
  return Object.entries(properties ?? {}).map(([name, json]) => ({
    name,
    in: place,
    required: place === 'path' || (required?.includes(name) ?? false),
    schema: json,
  }));
}

function problems(statuses: readonly (keyof typeof PROBLEM_RESPONSES)[]): Record<string, { readonly $ref: string }> {
  return Object.fromEntries(
    statuses.map((status) => [status, { $ref: `#/components/responses/${responseName(status)}` }]),
  );
}

function responseName(status: string): string {
  return status === 'default' ? 'Problem' : `Problem${status}`;
}

function components(schemas: JsonSchemas, paths: unknown): OpenApiDocument['components'] {
  const events = schemas.of(LiveEvent, 'output');
  const problem = schemas.of(ProblemDetails, 'output');
  const types = Object.keys(PROBLEM_KINDS).map((kind) => `\`/problems/${kind}\``);
  return {
    // What is sent as events stands in no JSON body, and is told all the same.
    schemas: schemas.componentsFor([paths, problem, events]),
    responses: Object.fromEntries(
      Object.entries(PROBLEM_RESPONSES).map(([status, description]) => [
        responseName(status),
        {
          description: status === 'default' ? `${description}. The types are ${types.join(', ')}` : description,
          content: { 'application/problem+json': { schema: problem } },
        },
      ]),
    ),
    securitySchemes: {
      session: {
        type: 'apiKey',
        in: 'cookie',
        name: 'fettle',
        description: 'The session’s cookie; over TLS its name is `__Host-fettle`',
      },
      formToken: { type: 'apiKey', in: 'header', name: 'X-Fettle-Token', description: 'The session’s `formToken`' },
    },
  };
}

function tagOf(path: string): string {
  return path.split('/')[2] ?? 'service';
}

function sayAudience(who: Audience): string {
  return who === 'anyone' ? 'For anyone.' : `For these roles: ${who.join(', ')}.`;
}
