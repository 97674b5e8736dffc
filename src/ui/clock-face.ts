/** Seconds as a clock shows them: 18 is "0:18", 3725 is "1:02:05". Negative counts as none. */
export function clockFace(seconds: number): string {
  const whole = Math.max(0, Math.floor(seconds));
  const twoDigits = (part: number) => String(part).padStart(2, '0');
  const hours = Math.floor(whole / 3600);
  const minutes = Math.floor(whole / 60) % 60;
  const rest = twoDigits(whole % 60);
  return hours > 0 ? `${hours}:${twoDigits(minutes)}:${rest}` : `${minutes}:${rest}`;
}
