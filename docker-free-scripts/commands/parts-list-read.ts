/** Reads one parts list and prints what it understood as JSON: npm run -s parts-list:read -- FILE. Exit 2 with row, column and cure where it can't. */
import { existsSync, readFileSync, statSync } from 'node:fs';
import { readPartsList } from '@/lib/parts-list/read-parts-list';

const MOST_BYTES = 64 * 1024 * 1024;

async function main(file: string | undefined): Promise<void> {
  if (file === undefined) throw new Error('say which file: npm run -s parts-list:read -- FILE');
  if (!existsSync(file) || !statSync(file).isFile()) throw new Error(`there is no file ${file}`);
  if (statSync(file).size > MOST_BYTES) throw new Error(`${file} is larger than ${MOST_BYTES / 1024 / 1024} MiB`);
  const reading = await readPartsList(readFileSync(file), { fileName: file });
  if (!reading.ok) {
    const place = [
      reading.sheet === undefined ? null : `sheet ${reading.sheet}`,
      reading.row === undefined ? null : `row ${reading.row}`,
      reading.column === undefined ? null : `column ${reading.column}`,
    ]
      .filter((one) => one !== null)
      .join(', ');
    throw new Error(`${place === '' ? '' : `${place}: `}${reading.detail} ${reading.cure}`);
  }
  const { lines, notLines, questions } = reading;
  const printed = {
    lines: lines.map(({ row, sheet, designators, quantity, fitted, kind, value, partNumber, alternatives, text }) => ({
      row,
      ...(sheet === undefined ? {} : { sheet }),
      designators,
      quantity,
      fitted,
      kind,
      value,
      partNumber,
      alternatives,
      text,
    })),
    notLines: notLines.map(({ row, sheet, why }) => ({ row, ...(sheet === undefined ? {} : { sheet }), why })),
    questions: questions.map(({ row, sheet, ask, options }) => ({
      row,
      ...(sheet === undefined ? {} : { sheet }),
      ask,
      options,
    })),
  };
  process.stdout.write(`${JSON.stringify(printed)}\n`);
}

main(process.argv[2]).catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : String(error));
  process.exitCode = 2;
});
