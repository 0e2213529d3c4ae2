import { z } from 'zod';
import { endpoint } from './endpoint';
import { emailField, newPasswordField, roleField } from './fields';

const signedInUser = z.object({
  id: z.uuid(),
  name: z.string(),
  email: z.string(),
  roles: z.array(roleField),
});
/** Any password that may ever have been set; length is bounded because hashing costs time. */
const passwordField = z.string().min(1, 'Type your password.').max(200);

export const signInSchema = z.strictObject({ email: emailField, password: passwordField });
export const forgotPasswordSchema = z.strictObject({ email: emailField });
export const resetPasswordSchema = z.strictObject({
  token: z.string().min(20).max(80),
  password: newPasswordField,
});
export const changePasswordSchema = z.strictObject({
  currentPassword: passwordField,
  newPassword: newPasswordField,
});

export const accountEndpoints = {
  signIn: endpoint({
    method: 'POST',
    path: '/api/session',
    action: 'session:sign-in',
    summary: 'Sign in',
    body: signInSchema,
    response: z.object({ user: signedInUser }),
    maxBodyBytes: 4096,
    cost: 'guess',
  }),
  signOut: endpoint({
    method: 'DELETE',
    path: '/api/session',
    action: 'session:sign-out',
    summary: 'Sign out',
    response: 'none',
  }),
  whoAmI: endpoint({
    method: 'GET',
    path: '/api/session',
    action: 'session:read',
    summary: 'Who is signed in',
    response: z.object({ user: signedInUser.nullable() }),
  }),
  signOutEverywhere: endpoint({
    method: 'POST',
    path: '/api/account/sign-out-everywhere',
    action: 'account:own',
    summary: 'End every session of yours',
    response: 'none',
  }),
  changePassword: endpoint({
    method: 'POST',
    path: '/api/account/password',
    action: 'account:own',
    summary: 'Change your password',
    body: changePasswordSchema,
    response: 'none',
    cost: 'guess',
    ownTransaction: true,
  }),
  forgotPassword: endpoint({
    method: 'POST',
    path: '/api/password-resets',
    action: 'password:reset',
    summary: 'Ask for a letter to set a new password',
    body: forgotPasswordSchema,
    response: 'none',
    cost: 'guess',
  }),
  resetPassword: endpoint({
    method: 'PUT',
    path: '/api/password-resets',
    action: 'password:reset',
    summary: 'Set a new password with the token of the letter',
    body: resetPasswordSchema,
    response: 'none',
    cost: 'guess',
  }),
};
