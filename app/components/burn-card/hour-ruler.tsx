export interface SharedHourRulerProps {
  readonly fromHour?: number;
  readonly toHour?: number;
}

/** The one ruler that stands in the head of a list of small cards. */
export function SharedHourRuler({ fromHour = 4, toHour = 22 }: SharedHourRulerProps) {
  const hours = Array.from({ length: toHour - fromHour + 1 }, (_, index) => fromHour + index);
  const part = (hour: number) => `${(((hour - fromHour) / (toHour - fromHour)) * 100).toFixed(3)}%`;
  const figured = (hour: number) => hour === toHour || (hour - fromHour) % 4 === 0;
  return (
    <svg width="100%" height="26" role="img" aria-label={`Hours of the day, ${fromHour} to ${toHour}, clock of each place`} className="block overflow-visible">
      {hours.filter((hour) => (hour - fromHour) % 2 === 0 || hour === toHour).map((hour) => (
        <line key={hour} x1={part(hour)} x2={part(hour)} y1={figured(hour) ? 19 : 22} y2="26" className="stroke-second" />
      ))}
      {hours.filter(figured).map((hour) => (
        <text key={hour} x={part(hour)} y="14" fontSize="12" textAnchor={hour === fromHour ? 'start' : hour === toHour ? 'end' : 'middle'} className="fill-second font-semibold">
          {String(hour).padStart(2, '0')}
        </text>
      ))}
    </svg>
  );
}
