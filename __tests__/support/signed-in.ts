import request from 'supertest';
import { serverUrl } from './server';

export type Mailbox = 'instructor' | 'prep' | 'purchasing' | 'safety' | 'admin' | 't.renwick';

/** Calls of the served app as one of the people of the demo; they carry the session and come from this site. */
export async function signedIn(mailbox: Mailbox) {
  const agent = request.agent(serverUrl());
  const answer = await agent
    .post('/api/session')
    .set('origin', serverUrl())
    .send({ email: `${mailbox}@larkmoor.example`, password: 'larkmoor-demo' });
  if (answer.status !== 200) throw new Error(`${mailbox} could not sign in: ${answer.status}`);
  return agent;
}

export type Agent = Awaited<ReturnType<typeof signedIn>>;

/** Somebody who has not signed in. */
export function stranger() {
  return request(serverUrl());
}

/** Names nothing anywhere. */
export const ABSENT_ID = '00000000-0000-4000-8000-000000000000';
