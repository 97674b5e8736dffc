import { type DataSource, In } from 'typeorm';
import { WebSession } from '../features/sign-in/web-session.entity.ts';
import { User } from '../features/users/user.entity.ts';
import { demoPeople } from './demo-people.ts';

/** Without the demo nobody stays signed in as one of its people, whose passwords are public. */
export async function closeDemo(db: DataSource): Promise<void> {
  const people = await db.manager.findBy(User, { email: In(demoPeople.map(({ email }) => email)) });
  if (people.length > 0) await db.manager.delete(WebSession, { userId: In(people.map(({ id }) => id)) });
}
