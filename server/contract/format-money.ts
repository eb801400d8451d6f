/** An amount without its cents: `€56,100`; what the browser does not know as a currency keeps its code in front. */
export function formatMoney(amount: number, currency: string): string {
  return new Intl.NumberFormat('en-GB', {
    style: 'currency',
    currency,
    maximumFractionDigits: Math.abs(amount) < 10 ? 2 : 0,
    minimumFractionDigits: 0,
  }).format(amount);
}
