import * as contract from '#shared/api/accounts.ts';
import { bind, bindForVisitors, type BoundEndpoint } from '../http/bind.ts';
import type { Services } from '../services.ts';
import * as service from './service.ts';

export function accountRoutes(services: Services): BoundEndpoint[] {
  return [
    bindForVisitors(contract.register, async ({ body }, { networkAddress }) => {
      await service.register(services, body, networkAddress);
      return null;
    }),
    bindForVisitors(contract.confirmAccount, async ({ body }, caller) => {
      const userId = await service.confirmAccount(services, body);
      await caller.startSession(userId);
      return service.readSessionOf(services, userId);
    }),
    bindForVisitors(contract.signIn, async ({ body }, caller) => {
      const userId = await service.signIn(services, body, caller.networkAddress);
      await caller.startSession(userId);
      return service.readSessionOf(services, userId);
    }),
    bindForVisitors(contract.getSession, (_input, { person }) =>
      service.readSession(services, person),
    ),
    bindForVisitors(contract.signOut, async (_input, caller) => {
      await caller.endSession();
      return null;
    }),
    bind(contract.signOutEverywhere, async (_input, caller) => {
      await services.sessions.endAllOf(services.db, caller.person.userId);
      await caller.endSession();
      return null;
    }),
    bindForVisitors(contract.requestPasswordReset, async ({ body }, { networkAddress }) => {
      await service.requestPasswordReset(services, body, networkAddress);
      return null;
    }),
    bindForVisitors(contract.resetPassword, async ({ body }, caller) => {
      const userId = await service.resetPassword(services, body);
      await caller.startSession(userId);
      return service.readSessionOf(services, userId);
    }),
    bind(contract.changePassword, async ({ body }, caller) => {
      await service.changePassword(services, caller.person, body, caller.networkAddress);
      await caller.startSession(caller.person.userId);
      return null;
    }),
    bind(contract.requestAddressChange, async ({ body }, { person, networkAddress }) => {
      await service.requestAddressChange(services, person, body, networkAddress);
      return null;
    }),
    bindForVisitors(contract.confirmAddressChange, async ({ body }, caller) => {
      const { userId, email } = await service.confirmAddressChange(services, body);
      if (caller.person?.userId === userId) await caller.startSession(userId);
      return { email };
    }),
  ];
}
