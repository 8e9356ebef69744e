import { openDatabase } from '@/db/connection';
import { transaction } from '@/db/transaction';

/** A second program at work on the same file: reads a number and writes the next one, so many times. `count-in-a-process.ts <file> <times>`. */
async function main([file = '', times = '']: string[]): Promise<void> {
  const db = openDatabase(file);
  for (let done = 0; done < Number(times); done += 1) {
    await transaction(db, async (trx) => {
      const row = await trx<{ id: string; valueJson: string }>('setting_version').where({ id: 'count' }).first('valueJson');
      await trx('setting_version').where({ id: 'count' }).update({ valueJson: String(Number(row?.valueJson) + 1) });
    });
  }
  process.stdout.write(times);
  await db.destroy();
}

void main(process.argv.slice(2));
