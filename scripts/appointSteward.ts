// Makes an account the first steward of an exchange that has none: npm run -s steward -- ADDRESS.
// The account is opened and confirmed on the sign-in page before. Stewards appoint all others, on their own page.
import { readConfig } from '../server/config';
import { connect } from '../server/db/connect';
import { migrate } from '../server/db/migrate';
import { User } from '../server/db/models';
import { appendTrail } from '../server/trail/appendTrail';

async function main(): Promise<void> {
  const email = process.argv[2]?.trim().toLowerCase();
  if (!email) throw new Error('usage: npm run -s steward -- ADDRESS');
  const db = await connect(readConfig().databaseFile);
  try {
    await migrate(db);
    await db.transaction(async (transaction) => {
      if ((await User.count({ where: { role: 'steward', lockedAt: null }, transaction })) > 0)
        throw new Error('There is a steward already, who can appoint others.');
      const user = await User.findOne({ where: { email, erasedAt: null }, transaction });
      if (!user?.emailVerifiedAt) throw new Error('No account with a confirmed address goes by this one.');
      const { id: subjectId, role: from } = user;
      await user.update({ role: 'steward' }, { transaction });
      await appendTrail(
        {
          ...{ actor: 'system', at: new Date(), subjectType: 'account', subjectId, action: 'appointed' },
          details: { role: 'steward', from },
        },
        transaction,
      );
    });
    console.log('The account is a steward now. Its next request has the role.');
  } finally {
    await db.close();
  }
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
});
