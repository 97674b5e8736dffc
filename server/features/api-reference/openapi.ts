import * as z from 'zod';
import type { Access, Endpoint } from '#shared/contracts/endpoint.ts';
import { problems } from '#shared/problem.ts';

type JsonSchema = z.core.JSONSchema.JSONSchema;

const schemaOf = (schema: z.core.$ZodType, io: 'input' | 'output'): JsonSchema => {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
  return rest;
};

const accessWords = (access: Access): string => {
  if (access === 'anyone') return 'Open to anyone.';
  if (access === 'signed-in') return 'For whoever is signed in.';
  return `For members of the organisation: ${access.join(', ')}. To everybody else it answers as if there were nothing.`;
};

function parametersOf(schema: z.core.$ZodType | undefined, where: 'path' | 'query') {
  if (schema === undefined) return [];
  const { properties = {}, required = [] } = schemaOf(schema, 'input');
  return Object.entries(properties).map(([name, property]) => ({
    name,
    in: where,
    required: where === 'path' || required.includes(name),
    schema: property,
  }));
}

/** JSON; and with a file a message of two parts. */
function bodyContent({ upload }: Endpoint, body: JsonSchema) {
  if (upload === undefined) return { 'application/json': { schema: body } };
  const file = { type: 'string', format: 'binary', description: `At most ${upload.limitBytes} bytes` };
  const parts = { 'multipart/form-data': { schema: { type: 'object', properties: { file, body } } } };
  return upload.isRequired ? parts : { ...parts, 'application/json': { schema: body } };
}

function operationOf(contract: Endpoint) {
  const { summary, access, path } = contract;
  const parameters = [...parametersOf(contract.params, 'path'), ...parametersOf(contract.query, 'query')];
  return {
    summary,
    description: accessWords(access),
    tags: [tagOf(path)],
    ...(access === 'anyone' ? { security: [] } : {}),
    ...(parameters.length === 0 ? {} : { parameters }),
    ...(contract.body === undefined
      ? {}
      : {
          requestBody: {
            required: true,
            content: bodyContent(contract, schemaOf(contract.body, 'input')),
          },
        }),
    responses: {
      200: {
        description: 'Done',
        content: contract.isDownload
          ? { 'application/octet-stream': { schema: { type: 'string', format: 'binary' } } }
          : { 'application/json': { schema: schemaOf(contract.reply, 'output') } },
      },
      default: { $ref: '#/components/responses/Refused' },
    },
  };
}

/** The last fixed word of a path that names things: studies, cables, sign-in. */
function tagOf(path: string): string {
  const [, first = '', , third] = path.split('/');
  return first === 'organisations' && third !== undefined ? third : first;
}

const refused = {
  description: 'Refused, with a reason for people (RFC 9457)',
  content: {
    'application/problem+json': {
      schema: {
        type: 'object',
        required: ['type', 'title', 'status', 'detail'],
        properties: {
          type: { type: 'string', enum: Object.keys(problems).map((code) => `urn:fairlead:problem:${code}`) },
          title: { type: 'string' },
          status: { type: 'integer' },
          detail: { type: 'string' },
          instance: { type: 'string', description: 'The number of the request, for whoever reads the log' },
          errors: {
            type: 'array',
            description: 'Every fault of the input',
            items: {
              type: 'object',
              required: ['pointer', 'detail'],
              properties: { pointer: { type: 'string', description: 'RFC 6901' }, detail: { type: 'string' } },
            },
          },
        },
      },
    },
  },
};

/**
 * The API as an OpenAPI 3.1 document, made from the very contracts that the server parses by.
 *
 * @param contracts every mounted contract
 * @see OpenAPI Specification 3.1.0
 */
export function openApiOf(contracts: readonly Endpoint[], version: string) {
  const paths: Record<string, Record<string, ReturnType<typeof operationOf>>> = {};
  for (const contract of contracts) {
    const path = `/api${contract.path.replace(/:([a-zA-Z]+)/g, '{$1}')}`;
    paths[path] = { ...paths[path], [contract.method.toLowerCase()]: operationOf(contract) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Fairlead',
      version,
      description:
        'Everything that travels is refused unless it keeps to these schemas, in both directions. A running session is led over live sockets (docs/architecture.md), which are not listed here.',
    },
    servers: [{ url: '/' }],
    security: [{ signedIn: [] }],
    paths,
    components: {
      securitySchemes: {
        signedIn: {
          type: 'apiKey',
          in: 'cookie',
          name: 'fairlead',
          description: 'Set by signing in; under TLS it is named __Host-fairlead.',
        },
      },
      responses: { Refused: refused },
    },
  };
}
