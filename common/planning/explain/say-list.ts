/** Names in a row as English says them: "Ana", "Ana and Ben", "Ana, Ben and Cleo"; "nobody" for none. */
export function list(names: readonly string[]): string {
  if (names.length === 0) return 'nobody';
  if (names.length === 1) return names[0];
  return `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`;
}

/** Minutes as a person says them: "45 min", "2 h", "2 h 30 min", "3 days" from two days up. */
export function sayMinutes(minutes: number): string {
  const whole = Math.max(0, Math.round(minutes));
  if (whole < 60) return `${whole} min`;
  if (whole >= 2880) {
    const days = Math.floor(whole / 1440);
    const hours = Math.round((whole % 1440) / 60);
    return hours > 0 && hours < 24 ? `${days} days ${hours} h` : `${hours === 24 ? days + 1 : days} days`;
  }
  const rest = whole % 60;
  return rest === 0 ? `${whole / 60} h` : `${Math.floor(whole / 60)} h ${rest} min`;
}
