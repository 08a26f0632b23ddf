/** The public file of the API's own description. */
import type { Express } from 'express';
import { endpoints } from '@common/contract';
import { docsPage, DOCS_STYLE } from './docs-page';
import { openApiDocument, type OpenApiDocument } from './document';
import { OTHER_ROUTES } from './other-routes';

/** The description as a document, and as a page to look things up in. Both are for anyone: they tell nothing of the studio. */
export function mountOpenApi(app: Express): void {
  // Made when first asked for: it takes longer than a start should.
  let made: OpenApiDocument | undefined;
  const document = (): OpenApiDocument => (made ??= openApiDocument(endpoints, OTHER_ROUTES));
  app.get('/api/openapi.json', (_request, response) => {
    response.set('Cache-Control', 'no-cache').json(document());
  });
  app.get('/api/docs', (_request, response) => {
    response.set('Cache-Control', 'no-cache').type('html').send(docsPage(document()));
  });
  app.get('/api/docs/style.css', (_request, response) => {
    response.set('Cache-Control', 'no-cache').type('css').send(DOCS_STYLE);
  });
}
