// Prints how many people have an account in the database of DATABASE_URL; 0 also while there is no schema yet.
import pg from 'pg';

const undefinedTable = '42P01';
const client = new pg.Client({ connectionString: process.env.DATABASE_URL });
await client.connect();
try {
  const { rows } = await client.query('select count(*) as people from users');
  console.log(rows[0].people);
} catch (error) {
  if (error.code !== undefinedTable) throw error;
  console.log(0);
} finally {
  await client.end();
}
