import { z } from 'zod';
import * as contract from '@common/contract';

/** A JSON Schema of draft 2020-12, which OpenAPI 3.1 speaks. */
export type JsonSchema = Readonly<Record<string, unknown>>;

const DEFS = '#/$defs/';
const COMPONENTS = '#/components/schemas/';

/** Direction of a schema: a default makes a member optional on its way in and certain on its way out. */
type Io = 'input' | 'output';

/**
 * Turns the contract's schemas into JSON Schemas. Those that the contract exports by name are told once, as components, and referred to;
 * one that reads otherwise on its way in gets a second component, `<name>Input`.
 */
export class JsonSchemas {
  readonly #registry = z.registry<{ id: string }>();
  readonly #named: Readonly<Record<Io, Readonly<Record<string, JsonSchema>>>>;
  readonly #twofold: ReadonlySet<string>;

  constructor() {
    for (const [name, value] of Object.entries(contract)) {
      if (isNamedShape(name, value) && !this.#registry.has(value)) this.#registry.add(value, { id: name });
    }
    this.#named = { input: this.#all('input'), output: this.#all('output') };
    this.#twofold = twofoldNames(this.#named.input, this.#named.output);
  }

  /** One schema, with references to components; one that is a component itself is a reference. */
  of(schema: z.ZodType, io: Io): JsonSchema {
    const { id } = this.#registry.get(schema) ?? {};
    return id === undefined ? this.shapeOf(schema, io) : { $ref: this.#address(id, io) };
  }

  /** One schema told in full, with references to components only inside. */
  shapeOf(schema: z.ZodType, io: Io): JsonSchema {
    const { id } = this.#registry.get(schema) ?? {};
    if (id !== undefined) return this.#refer(this.#named[io][id], io) as JsonSchema;
    const { $schema: _, $defs: _defs, ...json } = this.#convert(schema, io);
    return this.#refer(json, io) as JsonSchema;
  }

  /** The components that `user` refers to, and those that they refer to in turn, by name. */
  componentsFor(user: unknown): Readonly<Record<string, JsonSchema>> {
    const all = this.#components();
    const used = new Set<string>();
    const open = [JSON.stringify(user)];
    for (let text = open.pop(); text !== undefined; text = open.pop()) {
      for (const [, name] of text.matchAll(/"#\/components\/schemas\/(\w+)"/g)) {
        if (used.has(name)) continue;
        used.add(name);
        open.push(JSON.stringify(all.get(name)));
      }
    }
    return Object.fromEntries([...used].sort().map((name) => [name, all.get(name) ?? {}]));
  }

  #components(): ReadonlyMap<string, JsonSchema> {
    const named = (io: Io, names: Iterable<string>): [string, JsonSchema][] =>
      [...names].map((name) => [
        this.#address(name, io).slice(COMPONENTS.length),
        this.#refer(this.#named[io][name], io) as JsonSchema,
      ]);
    return new Map([...named('output', Object.keys(this.#named.output)), ...named('input', this.#twofold)]);
  }

  #all(io: Io): Readonly<Record<string, JsonSchema>> {
    const { schemas } = z.toJSONSchema(this.#registry, {
      target: 'draft-2020-12',
      io,
      unrepresentable: 'any',
      uri: (id) => `${DEFS}${id}`,
    });
    return Object.fromEntries(
      Object.entries(schemas).map(([name, { $schema: _, $id: _id, ...schema }]) => [name, schema]),
    );
  }

  #convert(schema: z.ZodType, io: Io): Record<string, unknown> {
    return z.toJSONSchema(schema, { target: 'draft-2020-12', io, unrepresentable: 'any', metadata: this.#registry });
  }

  #address(name: string, io: Io): string {
    return `${COMPONENTS}${name}${io === 'input' && this.#twofold.has(name) ? 'Input' : ''}`;
  }

  /** The same schema with its references pointed at components, and without the ids that named it. */
  #refer(json: unknown, io: Io): unknown {
    if (Array.isArray(json)) return json.map((item) => this.#refer(item, io));
    if (typeof json !== 'object' || json === null) return json;
    return Object.fromEntries(
      Object.entries(json).map(([key, value]) =>
        key === '$ref' && typeof value === 'string' && value.startsWith(DEFS)
          ? [key, this.#address(value.slice(DEFS.length), io)]
          : [key, this.#refer(value, io)],
      ),
    );
  }
}

/** Records and choices between them: what is worth a name. */
function isNamedShape(name: string, value: unknown): value is z.ZodType {
  return /^[A-Z]/.test(name) && (value instanceof z.ZodObject || value instanceof z.ZodDiscriminatedUnion);
}

/** Names that read differently in the two directions, by themselves or by what they refer to. */
function twofoldNames(
  input: Readonly<Record<string, JsonSchema>>,
  output: Readonly<Record<string, JsonSchema>>,
): ReadonlySet<string> {
  // On its way out nothing more than told is sent; that says nothing of how a thing reads.
  const textOf = (schema: JsonSchema): string =>
    JSON.stringify(schema).replaceAll(/,?"additionalProperties":false/g, '');
  const names = new Set(Object.keys(output).filter((name) => textOf(input[name]) !== textOf(output[name])));
  for (let size = -1; size !== names.size;) {
    size = names.size;
    for (const name of Object.keys(input)) {
      if ([...names].some((other) => textOf(input[name]).includes(`"${DEFS}${other}"`))) names.add(name);
    }
  }
  return names;
}
