export const ROLES = ['instructor', 'prep', 'purchasing', 'safety', 'admin'] as const;
export type Role = (typeof ROLES)[number];

export const ROLE_NAMES: Readonly<Record<Role, string>> = {
  instructor: 'Instructor',
  prep: 'Prep room',
  purchasing: 'Purchasing',
  safety: 'Safety officer',
  admin: 'Administrator',
};

/** Who is asking. One person may hold several roles. */
export interface Viewer {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
  /** Largest order total, in minor units, this person may approve. */
  readonly approvalLimitMinor: number;
}
