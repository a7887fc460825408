/** Prints the demo's sign-ins for the start script. */
import { demoSignIns } from '@/server/seeds/signIns';

const width = Math.max(...demoSignIns.map(({ email }) => email.length));
console.log('  Sign in as');
for (const { email, password, role, place } of demoSignIns) {
  console.log(`    ${email.padEnd(width)}  ${password}  ${role}, ${place}`);
}
