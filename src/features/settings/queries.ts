import { queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import type {
  apiKey,
  auditEntry,
  changeMember,
  changeTechnician,
  createApiKey,
  createdApiKey,
  family,
  inviteMember,
  Member,
  outboxMail,
  saveFamily,
  ShopSettings,
  Technician,
} from '../../../shared/administration';
import type { ModelListed } from '../../../shared/machines';
import type { sessionListed } from '../../../shared/session';
import { apiGet, apiSend, type List } from '../../lib/api';
import { listQuery } from '../../lib/list-query';

export type ApiKey = z.infer<typeof apiKey>;
export type CreatedKey = z.infer<typeof createdApiKey>;
export type NewKey = z.infer<typeof createApiKey>;
export type Family = z.infer<typeof family>;
export type FamilyDraft = z.infer<typeof saveFamily>;
export type Invitation = z.infer<typeof inviteMember>;
export type OutboxMail = z.infer<typeof outboxMail>;
export type AuditEntry = z.infer<typeof auditEntry>;
export type SignedIn = z.infer<typeof sessionListed>;

/** People, keys, technicians and families of one shop are few: one page holds them. */
const WHOLE = { limit: 1000 };

export const shopQuery = queryOptions({
  queryKey: ['shop', 'detail'],
  queryFn: ({ signal }) => apiGet<ShopSettings>('/shop', {}, signal),
});
export const peopleQuery = queryOptions({
  queryKey: ['people', 'list'],
  queryFn: ({ signal }) => apiGet<List<Member>>('/users', WHOLE, signal),
});
export const techniciansQuery = queryOptions({
  queryKey: ['technicians', 'list'],
  queryFn: ({ signal }) => apiGet<List<Technician>>('/technicians', WHOLE, signal),
});
export const keysQuery = queryOptions({
  queryKey: ['keys', 'list'],
  queryFn: ({ signal }) => apiGet<List<ApiKey>>('/keys', WHOLE, signal),
});
export const familiesQuery = queryOptions({
  queryKey: ['families', 'list'],
  queryFn: ({ signal }) => apiGet<List<Family>>('/families', WHOLE, signal),
});
export const modelChoicesQuery = queryOptions({
  queryKey: ['families', 'models'],
  queryFn: ({ signal }) => apiGet<List<ModelListed>>('/models', WHOLE, signal),
});
export const signedInQuery = queryOptions({
  queryKey: ['signed-in', 'list'],
  queryFn: ({ signal }) => apiGet<List<SignedIn>>('/sessions', WHOLE, signal),
});
export const outboxQuery = listQuery<OutboxMail>(['outbox', 'list'], '/outbox');
export const auditQuery = listQuery<AuditEntry>(['audit', 'list'], '/audit');

export const saveShop = (changes: Partial<ShopSettings>) => apiSend<ShopSettings>('PATCH', '/shop', changes);
export const invite = (invitation: Invitation) => apiSend<Member>('POST', '/users', invitation);
export const inviteAgain = (id: string) => apiSend('POST', `/users/${id}/invitation`);
export const changePerson = ({ id, ...changes }: { id: string } & z.infer<typeof changeMember>) =>
  apiSend<Member>('PATCH', `/users/${id}`, changes);
export const saveTechnician = ({ id, ...changes }: { id: string } & z.infer<typeof changeTechnician>) =>
  apiSend<Technician>('PATCH', `/technicians/${id}`, changes);
export const giveSpelling = ({ id, technicianId }: { id: string; technicianId: string }) =>
  apiSend<Technician>('PUT', `/technician-names/${id}`, { technicianId });
export const makeKey = (key: NewKey) => apiSend<CreatedKey>('POST', '/keys', key);
export const revokeKey = (id: string) => apiSend('DELETE', `/keys/${id}`);
export const saveFamilyAs = ({ id, ...draft }: { id: string | null } & FamilyDraft) =>
  id === null
    ? apiSend<Family>('POST', '/families', draft)
    : apiSend<Family>('PUT', `/families/${id}`, draft);
export const removeFamily = (id: string) => apiSend('DELETE', `/families/${id}`);
export const signOutThere = (id: string) => apiSend('DELETE', `/sessions/${id}`);
export const signOutEverywhere = () => apiSend('DELETE', '/sessions');
