import type { Viewer } from '@/lib/domain/roles';
import type { RequestLineInput } from '@/lib/schemas/requests';
import { createRequest, submitRequest, withdrawRequest } from '@/lib/services/requests';
import { decideReview } from '@/lib/services/review-decisions';
import { environment } from '@/lib/config/env';
import type { DemonstrationModel } from '@/models/demonstration';
import { ReviewModel } from '@/models/review';
import type { SessionModel } from '@/models/session';
import type { SolutionModel } from '@/models/solution';
import type { UserModel } from '@/models/user';

interface Material {
  readonly people: ReadonlyMap<string, UserModel>;
  readonly sessions: readonly SessionModel[];
  readonly solutions: ReadonlyMap<string, SolutionModel>;
  readonly demonstrations: ReadonlyMap<string, DemonstrationModel>;
}

export function viewerOf({ id, name, email, roles, approvalLimitMinor }: UserModel): Viewer {
  return { id, name, email, roles, approvalLimitMinor };
}

/** Requests in many states, made through the same services as anybody's. */
export async function seedRequests({ people, sessions, solutions, demonstrations }: Material): Promise<void> {
  const person = (mailbox: string) => {
    const user = people.get(mailbox);
    if (!user) throw new Error(`Nobody is called ${mailbox}`);
    return viewerOf(user);
  };
  const solution = (name: string, volumePerBenchMl: number, spareBenches = 1): RequestLineInput => {
    const found = solutions.get(name);
    if (!found) throw new Error(`No recipe is called ${name}`);
    return { kind: 'solution', solutionId: found.id, volumePerBenchMl, spareBenches };
  };
  const demonstration = (name: string, performances = 1): RequestLineInput => {
    const found = demonstrations.get(name);
    if (!found) throw new Error(`No demonstration is called ${name}`);
    return { kind: 'demonstration', demonstrationId: found.id, performances };
  };
  const upcoming = (instructor: string) => {
    const { id } = person(instructor);
    return sessions.filter(
      (session) => session.instructorId === id && session.startsAt.getTime() > Date.now(),
    );
  };
  const ask = async (who: string, index: number, lines: RequestLineInput[], note: string | null = null) => {
    const session = upcoming(who)[index];
    if (!session) throw new Error(`${who} has no session ${index} ahead`);
    return createRequest(person(who), { sessionId: session.id, note, lines });
  };
  const submit = async (
    who: string,
    index: number,
    lines: RequestLineInput[],
    note: string | null = null,
  ) => {
    const draft = await ask(who, index, lines, note);
    return submitRequest(person(who), draft.id, { version: draft.version, reason: '' });
  };

  await submit('instructor', 0, [
    solution('Copper(II) sulfate 0.1 mol/L', 40),
    solution('Ammonia 2 mol/L', 30),
    demonstration('Nickel to its blue ammine'),
  ]);
  await submit('instructor', 1, [
    solution('Hydrochloric acid 0.1 mol/L', 60),
    solution('Sodium hydroxide 0.1 mol/L', 60),
    solution('Ethanoic acid 0.1 mol/L', 30),
  ]);
  await submit('t.renwick', 0, [
    solution('Zinc sulfate 0.1 mol/L', 20),
    solution('Sodium hydroxide 1 mol/L', 20),
    demonstration('Zinc hydroxide, both ways'),
  ]);
  await submit('t.renwick', 1, [
    solution('Disodium EDTA 0.0100 mol/L', 100, 2),
    solution('Calcium chloride 0.1 mol/L', 25),
  ]);
  const cyanide = await submit(
    'instructor',
    2,
    [demonstration('Silver into its cyanide complex'), solution('Hydrochloric acid 0.1 mol/L', 30)],
    'Shown once by me, behind the screen.',
  );
  const returned = await submit('t.renwick', 2, [demonstration('Silver into its cyanide complex')]);
  await ask(
    'instructor',
    3,
    [solution('Silver nitrate 0.05 mol/L', 20), solution('Sodium chloride 0.1 mol/L', 20)],
    'Not finished.',
  );
  const withdrawn = await submit('t.renwick', 3, [
    solution('Barium chloride 0.1 mol/L', 20),
    solution('Sodium sulfate 0.1 mol/L', 20),
  ]);
  await withdrawRequest(person('t.renwick'), withdrawn.id, {
    version: withdrawn.version,
    reason: 'The session does something else.',
  });
  await submit('instructor', 4, [demonstration('Golden rain', 2), demonstration('Prussian blue')]);

  const officer = person('safety');
  const review = await ReviewModel.findOne({ where: { requestId: returned.id, state: 'waiting' } });
  if (review) {
    await decideReview(officer, review.id, {
      verdict: 'returned',
      text: 'Could the thiosulfate complex show the same? What happens with the leftovers?',
      version: review.version,
      password: environment().DEMO_PASSWORD,
    });
  }
  if (cyanide.state !== 'in-review') throw new Error('The cyanide request should wait for safety');
}
