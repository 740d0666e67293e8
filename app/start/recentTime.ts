/** When a file was last opened, as people say it: "today, 11:42", "yesterday", "27 November". */
export function whenOpened(iso: string, now: Date): string {
  const then = new Date(iso);
  if (Number.isNaN(then.getTime())) return '';
  const midnight = (date: Date): number => new Date(date.getFullYear(), date.getMonth(), date.getDate()).getTime();
  const days = Math.round((midnight(now) - midnight(then)) / 86_400_000);
  if (days <= 0) return `today, ${then.toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' })}`;
  if (days === 1) return 'yesterday';
  const year = then.getFullYear() === now.getFullYear() ? {} : ({ year: 'numeric' } as const);
  return then.toLocaleDateString('en-GB', { day: 'numeric', month: 'long', ...year });
}
