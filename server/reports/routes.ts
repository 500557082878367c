import * as contract from '#shared/api/reports.ts';
import { authorizeReport, authorizeSong } from '../http/authorize.ts';
import { bind, bindForVisitors, type BoundEndpoint } from '../http/bind.ts';
import type { Services } from '../services.ts';
import * as service from './service.ts';

export function reportRoutes(services: Services): BoundEndpoint[] {
  const { db } = services;
  return [
    bind(contract.storeReport, async ({ params, body }, { person }) => {
      const may = await authorizeSong(db, person, params.songId, 'store-report');
      return service.storeReport(services, may, body);
    }),
    bind(contract.listSongReports, async ({ params, query }, { person }) => {
      const may = await authorizeSong(db, person, params.songId, 'read-project');
      return service.listSongReports(services, may, query);
    }),
    bind(contract.listMyReports, ({ query }, { person }) =>
      service.listMyReports(services, person, query),
    ),
    bind(contract.getReport, async ({ params }, { person }) => {
      const may = await authorizeReport(db, person, params.reportId, 'read-project');
      return service.getReport(services, may);
    }),
    bind(contract.putOverviews, async ({ params, bytes }, { person }) => {
      const may = await authorizeReport(db, person, params.reportId, 'add-overviews');
      await service.putOverviews(services, may, bytes);
      return null;
    }),
    bind(contract.getOverviews, async ({ params }, { person }) => {
      const may = await authorizeReport(db, person, params.reportId, 'read-project');
      return service.getOverviews(services, may);
    }),
    bind(contract.createReportShare, async ({ params, body }, { person }) => {
      const may = await authorizeReport(db, person, params.reportId, 'share-report');
      return service.createShare(services, may, body.expiresInDays);
    }),
    bind(contract.listReportShares, async ({ params, query }, { person }) => {
      const may = await authorizeReport(db, person, params.reportId, 'share-report');
      return service.listShares(services, may, query);
    }),
    bind(contract.revokeReportShare, async ({ params }, { person }) => {
      const may = await authorizeReport(db, person, params.reportId, 'share-report');
      await service.revokeShare(services, may, params.shareId);
      return null;
    }),
    bindForVisitors(contract.readSharedReport, ({ body }) =>
      service.readShared(services, body.token),
    ),
    bindForVisitors(contract.readSharedOverviews, ({ body }) =>
      service.readSharedOverviews(services, body.token),
    ),
  ];
}
