/** Every use case of this area; lib/registry.ts joins the areas for the API description and the authorisation matrix. */
import type { UseCase } from '@/lib/api/use-case';
import { createToken, listTokens, revokeToken } from './api-tokens';
import { askForPasswordReset, askForSignInLink } from './ask-for-link';
import { changeRoles, endMembership } from './change-roles';
import { acceptInvitation, invitePerson, lookAtInvitation, withdrawInvitation } from './invite-person';
import { listPeople } from './list-people';
import { setPassword } from './set-password';
import { changeSettings, getSettings } from './settings';
import { whatWaits } from './what-waits';
import { endMySessions, whoAmI } from './who-am-i';

export const workshopUseCases: readonly UseCase[] = [
  whatWaits,
  whoAmI,
  endMySessions,
  listPeople,
  invitePerson,
  withdrawInvitation,
  lookAtInvitation,
  acceptInvitation,
  changeRoles,
  endMembership,
  createToken,
  listTokens,
  revokeToken,
  getSettings,
  changeSettings,
  askForSignInLink,
  askForPasswordReset,
  setPassword,
];
