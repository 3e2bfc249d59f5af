/** `1 h 30`, `45 min`, `2 d 4 h`, as figures on a card. A minute is the smallest; what is shorter is told in seconds. */
export function durationText(seconds: number): string {
  const sign = seconds < 0 ? '−' : '';
  const whole = Math.abs(seconds);
  if (whole > 0 && whole < 60) return `${sign}${Math.round(whole)} s`;
  const minutes = Math.round(whole / 60);
  const hours = Math.floor(minutes / 60);
  const rest = minutes % 60;
  if (hours === 0) return `${sign}${rest} min`;
  return `${sign}${hours} h ${String(rest).padStart(2, '0')}`;
}

/** Hours and minutes apart, for a figure whose units are set small. */
export function hoursAndMinutes(seconds: number): { hours: number; minutes: number } {
  const minutes = Math.round(seconds / 60);
  return { hours: Math.floor(minutes / 60), minutes: minutes % 60 };
}

/** `+2 h`, `+30 min`, `+1 h 30`: run time at the foot of the strip. */
export function runTimeText(timeS: number, stepS: number): string {
  const sign = timeS < 0 ? '−' : '+';
  const whole = Math.abs(timeS);
  if (stepS < 60)
    return `${sign}${Math.floor(whole / 60)}:${String(Math.round(whole % 60)).padStart(2, '0')}`;
  const minutes = Math.round(whole / 60);
  if (minutes % 60 === 0) return `${sign}${minutes / 60} h`;
  if (minutes < 60) return `${sign}${minutes} min`;
  return `${sign}${Math.floor(minutes / 60)} h ${String(minutes % 60).padStart(2, '0')}`;
}
