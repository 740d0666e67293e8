/**
 * `npm run references`: solves every random plan by the independent reference and stores the answers. Takes an hour or so;
 * what is stored for a plan that has not changed is kept, unless `-- --all` asks for everything anew.
 */
import { existsSync, writeFileSync } from 'node:fs';
import { physicsOf, randomPlan } from './plans';
import { reference } from './reference';
import { digestOf, FILE, PLANS, readStored, textOf, type Stored } from './store';

const known: Stored = existsSync(FILE) && !process.argv.includes('--all') ? readStored() : { plans: [], left: [] };
const stored: Stored = { plans: [], left: [] };

for (let seed = 1; stored.plans.length < PLANS; seed++) {
  const digest = digestOf(seed);
  const same = (entry: { seed: number; digest: string }): boolean => entry.seed === seed && entry.digest === digest;
  const keptPlan = known.plans.find(same);
  const keptLeft = known.left.find(same);
  if (keptPlan !== undefined) stored.plans.push(keptPlan);
  else if (keptLeft !== undefined) stored.left.push(keptLeft);
  else solveAnew(seed, digest);
}
write();

function solveAnew(seed: number, digest: string): void {
  const plan = randomPlan(seed);
  const began = performance.now();
  let said: string;
  try {
    const { answers, steps } = reference(plan);
    stored.plans.push({ seed, digest, answers });
    said = `${steps.join('/')} steps`;
  } catch (error) {
    const why = error instanceof Error ? error.message : String(error);
    stored.left.push({ seed, digest, why });
    said = `left out: ${why}`;
  }
  const seconds = ((performance.now() - began) / 1000).toFixed(1);
  console.log(`${stored.plans.length}/${PLANS}  seed ${seed}  ${seconds} s  ${said}  (${physicsOf(plan).join(', ')})`);
  write();
}

/** What is done is kept, and with it what was known of the seeds to come. */
function write(): void {
  const done = stored.plans.length + stored.left.length;
  const rest = stored.plans.length < PLANS;
  writeFileSync(
    FILE,
    textOf({
      plans: [...stored.plans, ...(rest ? known.plans.filter(({ seed }) => seed > done) : [])],
      left: [...stored.left, ...(rest ? known.left.filter(({ seed }) => seed > done) : [])],
    }),
  );
}
