import { z } from 'zod';
import { endpoint } from './endpoint';
import { emailField, idParams, nameField, newPasswordField, roleField, versionField } from './fields';
import { listQuery, pageOf } from './list';

export const userSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  email: z.string(),
  roles: z.array(roleField),
  approvalLimitMinor: z.number().int(),
  isDisabled: z.boolean(),
  isLocked: z.boolean(),
  version: z.number().int(),
});
export type User = z.infer<typeof userSchema>;

const rolesField = z.array(roleField).min(1, 'At least one role.').max(5);
const limitField = z.number().int().min(0).max(100_000_00);

export const userCreateSchema = z.strictObject({
  name: nameField,
  email: emailField,
  roles: rolesField,
  approvalLimitMinor: limitField,
  password: newPasswordField,
});
export type UserCreate = z.output<typeof userCreateSchema>;

export const userPatchSchema = z.strictObject({
  name: nameField,
  roles: rolesField,
  approvalLimitMinor: limitField,
  isDisabled: z.boolean(),
  version: versionField,
});
export type UserPatch = z.output<typeof userPatchSchema>;

export const userListQuerySchema = listQuery(['name', 'email'], 'name', {});
export type UserListQuery = z.output<typeof userListQuerySchema>;

export const userEndpoints = {
  list: endpoint({
    method: 'GET',
    path: '/api/users',
    action: 'user:manage',
    summary: 'Accounts',
    query: userListQuerySchema,
    response: pageOf(userSchema),
    columns: [
      { key: 'name', header: 'Name' },
      { key: 'email', header: 'E-mail' },
      { key: 'roles', header: 'Roles' },
    ],
  }),
  create: endpoint({
    method: 'POST',
    path: '/api/users',
    action: 'user:manage',
    summary: 'Open an account',
    body: userCreateSchema,
    response: userSchema,
    status: 201,
  }),
  update: endpoint({
    method: 'PATCH',
    path: '/api/users/{id}',
    action: 'user:manage',
    summary: 'Change or close an account',
    params: idParams,
    body: userPatchSchema,
    response: userSchema,
  }),
};
