import type { LevelUnit } from '#shared/levels/level-units.ts';
import { levelMilliDb } from '#shared/levels/level-units.ts';
import { exactDbText, hertzText } from '#shared/levels/level-words.ts';
import { classNames } from '../../ui/class-names.ts';
import { controlLook } from '../../ui/control-look.ts';
import { faultAt, noReadings, type Place, placeKey, rowsOf, type TypedLevels } from './typed-levels.ts';

type LevelGridProps = {
  typed: TypedLevels;
  places: readonly Place[];
  /** Whether what is missing is marked: once somebody has tried to send it. */
  isAsked: boolean;
  onType: (place: Place, index: number, text: string) => void;
};

/** One line a place, three readings each; the level they come to stands beside them at once. */
export function LevelGrid({ typed, places, isAsked, onType }: LevelGridProps) {
  const groups = [...new Set(places.map(({ frequencyHz }) => frequencyHz))];
  return (
    <div className="flex flex-col gap-8">
      {groups.map((frequencyHz) => (
        <table key={frequencyHz} className="w-full border-collapse">
          <caption className="pb-2 text-left text-lg font-bold">
            {hertzText(frequencyHz)}
            <span className="sr-only">, readings in {unitName(typed.unit)}</span>
          </caption>
          <thead>
            <tr className="border-b-2 border-ink text-left align-bottom">
              <th scope="col" className="py-2 pr-3">
                Code
              </th>
              <th scope="col" className="py-2 pr-3 max-sm:hidden">
                Channel
              </th>
              {noReadings.map((_, index) => (
                // biome-ignore lint/suspicious/noArrayIndexKey: the readings of a line have no name but their place
                <th key={index} scope="col" className="py-2 pr-2 font-semibold">
                  {index + 1}
                  <span className="sr-only">. reading</span>
                </th>
              ))}
              <th scope="col" className="py-2 text-right whitespace-nowrap max-md:hidden">
                Level, dB
              </th>
            </tr>
          </thead>
          <tbody>
            {places
              .filter((place) => place.frequencyHz === frequencyHz)
              .map((place) => (
                <Line key={placeKey(place)} place={place} typed={typed} isAsked={isAsked} onType={onType} />
              ))}
          </tbody>
        </table>
      ))}
    </div>
  );
}

const unitName = (unit: LevelUnit) => (unit === 'V' ? 'volts' : unit);

function Line({ place, typed, isAsked, onType }: Omit<LevelGridProps, 'places'> & { place: Place }) {
  const readings = typed.readings[placeKey(place)] ?? noReadings;
  const isMissing = isAsked && readings.some((reading) => reading.trim() === '');
  const fault = faultAt(readings, typed.unit) ?? (isMissing ? 'A reading is missing.' : null);
  const [row] = rowsOf(typed, [place]);
  const faultId = `fault-${placeKey(place).replaceAll(' ', '-')}`;
  return (
    <>
      <tr className={fault === null ? 'border-b border-rule' : ''}>
        <th scope="row" className="py-1.5 pr-3 text-left font-mono font-semibold">
          {place.code}
          <span className="block font-sans text-sm font-normal text-soft sm:hidden">{place.channel}</span>
        </th>
        <td className="py-1.5 pr-3 max-sm:hidden">{place.channel}</td>
        {readings.map((reading, index) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: the readings of a line have no name but their place
          <td key={index} className="py-1.5 pr-2">
            <input
              type="text"
              inputMode="decimal"
              autoComplete="off"
              value={reading}
              aria-label={`${place.code}, ${place.channel}, ${hertzText(place.frequencyHz)}, reading ${index + 1}`}
              aria-invalid={
                faultAt([reading], typed.unit) !== null || (isAsked && reading.trim() === '') ? true : undefined
              }
              aria-describedby={fault === null ? undefined : faultId}
              onChange={(event) => onType(place, index, event.target.value)}
              className={classNames(controlLook, 'min-w-16 px-2 font-mono')}
            />
          </td>
        ))}
        <td className="py-1.5 text-right font-mono max-md:hidden">
          {row === undefined ? '' : exactDbText(levelMilliDb(row.readings, typed.unit))}
        </td>
      </tr>
      {fault === null ? null : (
        <tr className="border-b border-rule">
          <td colSpan={noReadings.length + 3} id={faultId} className="pb-2 font-semibold text-amber">
            {fault}
          </td>
        </tr>
      )}
    </>
  );
}
