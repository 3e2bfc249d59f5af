import type { Role } from '~/lib/contracts/common';
import type { Version } from '~/lib/contracts/profiles';

export interface EditorPermissions {
  readonly edit: boolean;
  readonly submit: boolean;
  readonly review: boolean;
  readonly retire: boolean;
  readonly newVersion: boolean;
  readonly duplicate: boolean;
  readonly handOut: boolean;
  readonly planRun: boolean;
}

/**
 * What the editor offers to whom. The server decides for itself at every call; this only keeps buttons away that would
 * be refused.
 */
export function permissionsFor(
  person: { readonly id: string; readonly roles: readonly Role[] },
  version: Pick<Version, 'state' | 'authorId'>,
  profileAuthorId: string,
  mayApproveOwn: boolean,
): EditorPermissions {
  const has = (...roles: readonly Role[]): boolean => roles.some((role) => person.roles.includes(role));
  const { state } = version;
  const isAuthor = version.authorId === person.id;
  const mayWrite = isAuthor || profileAuthorId === person.id || has('technician');
  return {
    edit: state === 'draft' && mayWrite,
    submit: state === 'draft' && isAuthor,
    review: state === 'in-review' && has('teacher', 'owner') && (!isAuthor || mayApproveOwn),
    retire: state === 'approved' && has('teacher', 'owner', 'technician'),
    newVersion: state !== 'draft' && mayWrite,
    duplicate: true,
    handOut: state === 'approved' && has('teacher', 'owner'),
    planRun: state !== 'retired' && has('technician'),
  };
}
