import type { FeedScope } from '@common/contract/feeds';
import { notFound } from '../http/problem';
import type { FeedRepository } from './feed-repository';

/** What a calendar is called: whose it is, then the studio. Throws where the maker or production is not there. */
export async function calendarName(feeds: FeedRepository, scope: FeedScope, studioName: string): Promise<string> {
  switch (scope.kind) {
    case 'maker': {
      const maker = await feeds.maker(scope.makerId);
      if (!maker) throw notFound('maker');
      return `${maker.name}, ${studioName}`;
    }
    case 'production': {
      const production = await feeds.production(scope.productionId);
      if (!production) throw notFound('production');
      return `${production.name}, ${studioName}`;
    }
    case 'studio':
      return `${studioName}: issued plan`;
  }
}
