export const DAYS_A_YEAR = 365.25

/** A round axis a hair past its end is still that axis. */
const TOLERANCE_YEARS = 0.05
const YEARS_AT_LEAST = 2

/** The ages at which a plumb line is drawn. */
export interface Ages { mean: number, p10: number, p90: number, p50?: number }

/** How many years a common axis has: the oldest 90 % figure, rounded up to even. */
export function axisYears(oldestDays: readonly (number | null)[]): number {
  const years = Math.max(0, ...oldestDays.map(days => days ?? 0)) / DAYS_A_YEAR
  return Math.max(YEARS_AT_LEAST, 2 * Math.ceil((years - TOLERANCE_YEARS) / 2))
}

/** Where on an axis so many days lie. */
export function placeOf(days: number, years: number, wide: number): number {
  return Math.round(days / DAYS_A_YEAR / years * wide * 10) / 10
}

/** The years that are written below an axis. */
export function writtenYears(years: number): number[] {
  const every = years <= 10 ? 2 : years <= 24 ? 4 : 10
  return Array.from({ length: Math.floor(years / every) + 1 }, (_, index) => index * every)
}

/** The five-sided bob with its collar; its point hangs at (x, y). */
export function bobPath(x: number, y: number): string {
  return `M${x - 2.5} ${y - 14.5}h5v3.5h2.5v5l-5 6-5-6v-5h2.5z`
}

/** The ages of a vessel, or null if it holds no beer. */
export function agesOf({ meanAgeDays, p10AgeDays, p50AgeDays, p90AgeDays }: Record<'meanAgeDays' | 'p10AgeDays' | 'p50AgeDays' | 'p90AgeDays', number | null>): Required<Ages> | null {
  if (meanAgeDays === null || p10AgeDays === null || p50AgeDays === null || p90AgeDays === null) return null
  return { mean: meanAgeDays, p10: p10AgeDays, p50: p50AgeDays, p90: p90AgeDays }
}
