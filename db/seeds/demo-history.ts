import type { House } from './demo-types';
import { layLadder } from './demo-ladder';
import { layPayments, layPrices, layTuitionRun } from './demo-money';
import { layPayRuns, layRates } from './demo-pay';
import { layPractice } from './demo-practice';

/** Bills, payments, pay, the ladder and the practice of the past two terms, made by the same operations as the screens use. */
export async function layHistory(house: House): Promise<void> {
  await layPrices(house);
  await layTuitionRun(house, house.terms.last, { instalments: 1 });
  await layPayments(house, house.terms.last, { allPaid: true });
  await layTuitionRun(house, house.terms.current, { instalments: 3 });
  await layPayments(house, house.terms.current, { allPaid: false });
  await layRates(house);
  await layPayRuns(house);
  await layLadder(house);
  await layPractice(house);
}
