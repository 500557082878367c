import * as contract from '#shared/api/rules.ts';
import { bindForVisitors, type BoundEndpoint } from '../http/bind.ts';
import type { Services } from '../services.ts';
import * as service from './service.ts';

export function ruleRoutes(services: Services): BoundEndpoint[] {
  return [
    bindForVisitors(contract.listEditions, ({ params, query }) =>
      service.listEditions(services, params.slug, query),
    ),
    bindForVisitors(contract.getEdition, ({ params }) =>
      service.getEdition(services, params.slug, params.number),
    ),
  ];
}
