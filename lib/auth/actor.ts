/** Who acts: a person in one workshop with their roles there, by session or by API token. Taken from neither body nor path. */

export const ROLES = ['builder', 'storekeeper', 'buyer', 'lead'] as const;
export type Role = (typeof ROLES)[number];

export interface Actor {
  readonly personId: string;
  readonly personName: string;
  readonly email: string;
  readonly workshopId: string;
  readonly workshopName: string;
  readonly roles: readonly Role[];
  readonly via: 'session' | 'token';
  /** A token of scope `read` may only ask. */
  readonly mayWrite: boolean;
}

export function isRole(text: string): text is Role {
  return (ROLES as readonly string[]).includes(text);
}
