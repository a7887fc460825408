import { demoSignIns } from '@/server/seeds/signIns';

export type DemoRole = (typeof demoSignIns)[number]['role'];

/** The first demo person with this role. */
export function demoPerson(role: DemoRole): { email: string; password: string } {
  const found = demoSignIns.find((one) => one.role === role);
  if (!found) throw new Error(`the demo has nobody with the role ${role}`);
  return found;
}
