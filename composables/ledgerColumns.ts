/** The columns of a ledger file, with what each says. The first eight carry the beer; the rest may be left out. */
export const LEDGER_COLUMNS = [
  { id: 'date', is: 'day it happened', example: '2026-09-14' },
  { id: 'act', is: 'kind', example: 'in, draw, move, loss, sample, addition, note' },
  { id: 'vessel', is: 'vessel', example: 'Heron' },
  { id: 'litres', is: 'litres', example: '1000' },
  { id: 'target', is: 'brew, vessel or run', example: 'FB26-2' },
  { id: 'brewed', is: 'brew day', example: '2026-08-10' },
  { id: 'lossOnWay', is: 'lost on the way, L', example: '15' },
  { id: 'reason', is: 'reason of a loss', example: 'evaporation, leak, lees, transfer, dumped' },
  { id: 'method', is: 'how measured', example: 'weighed, flowMeter, dip, sight, guess' },
  { id: 'ageBand', is: 'age in doubt, ± d', example: '180' },
  { id: 'note', is: 'note', example: 'topping from Coot' },
] as const

export const LEDGER_EXAMPLE = `${LEDGER_COLUMNS.map(({ id }) => id).join(';')}
2026-03-23;draw;Heron;1000;P26-01;;;;;;
2026-03-23;in;Heron;1000;FB26-1;2026-02-16;;;flowMeter;;`
