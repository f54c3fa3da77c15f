import { permissionOf, type Area, type Permission } from '../../shared/roles';
import { granteesOf, type Actor } from './actor';

const RANK: readonly Permission[] = ['-', 'own', 'r', 'rw'];

/** The most that any of the actor's grants allows in an area. */
export function permissionFor(actor: Actor, area: Area): Permission {
  return granteesOf(actor)
    .map((grantee) => permissionOf(grantee, area))
    .reduce((most, next) => (RANK.indexOf(next) > RANK.indexOf(most) ? next : most), '-');
}

/** Programs read the records without customers and technicians. */
export const maySeePeople = (actor: Actor): boolean => actor.kind === 'user';
