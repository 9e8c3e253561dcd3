import { evaporationRate, evaporationRateUs, type EvaporationEstimate } from '@/lib/concrete/evaporation';
import { given } from '@/lib/concrete/check-input';
import { apartText, numberText } from '@/lib/concrete/number-text';
import { defineCalculation } from '../calculation';
import { check, choice, number, quantity } from '../fields';
import { KM_PER_MILE } from '../quantities';

const fields = {
  units: choice('Units', { mm: '°C, km/h', in: '°F, mph' }, ['mm', 'in']),
  concrete: quantity('Concrete temperature', 'temperature', ['30', '86'], {
    hint: 'At the surface, as placed',
    refusedAs: ['concrete temperature'],
  }),
  air: quantity('Air temperature', 'temperature', ['30', '86'], { refusedAs: ['air temperature'] }),
  humidity: number('Relative humidity', '50', [0, 100], { unit: '%', refusedAs: ['relative humidity'] }),
  wind: quantity('Wind', 'speed', ['20', '12'], {
    hint: 'Half a metre above the surface',
    refusedAs: ['wind'],
  }),
  silicaFume: check('Concrete with silica fume: the limit is half', 'no'),
} as const;

const ADVICE: Record<EvaporationEstimate['advice'], string> = {
  below: 'below it, with the whole of its uncertainty',
  maybe: 'below it, but not with its uncertainty: be ready to protect',
  over: 'at or over it: protect the surface, or wait',
};

export interface EvaporationScene {
  rate: number;
  rateText: string;
  low: number;
  high: number;
  threshold: number;
  unit: string;
}

const toF = (celsius: number) => (celsius * 9) / 5 + 32;

/** Evaporation from fresh concrete by Uno, in the units chosen, against the limit above which the surface is protected. */
export const evaporationCalculation = defineCalculation({
  fields,
  groups: [
    { legend: 'Concrete', names: ['concrete', 'silicaFume'] },
    { legend: 'Weather at the pour', names: ['air', 'humidity', 'wind'] },
  ],
  compute: (values) => {
    const concreteC = given('concrete', values.concrete);
    const airC = given('air', values.air);
    const humidity = given('humidity', values.humidity) / 100;
    const windKmh = given('wind', values.wind);
    const found =
      values.units === 'mm'
        ? evaporationRate({ concreteC, airC, humidity, windKmh }, values.silicaFume)
        : evaporationRateUs(
            {
              concreteF: toF(concreteC),
              airF: toF(airC),
              humidity,
              windMph: windKmh / KM_PER_MILE,
            },
            values.silicaFume,
          );
    const digits = values.units === 'mm' ? 2 : 3;
    const [rate, threshold] = apartText(found.rate, found.threshold, digits);
    const { low, high } = found.range;
    return {
      figures: [
        {
          id: 'rate',
          label: found.rate < 0 ? 'Evaporation rate (water condenses)' : 'Evaporation rate',
          text: `${rate} ${found.unit}`,
          value: found.rate,
          main: true,
          formula: found.trail[0]?.rule,
          source: found.trail[0]?.clause,
        },
        {
          id: 'range',
          label: 'With its uncertainty',
          text: `${numberText(low, digits)} to ${numberText(high, digits)} ${found.unit}`,
          value: null,
        },
        {
          id: 'threshold',
          label: 'Protect from',
          text: `${threshold} ${found.unit}`,
          value: found.threshold,
        },
        { id: 'advice', label: 'The rate is', text: ADVICE[found.advice], value: null, words: true },
      ],
      warnings: [],
      trail: found.trail,
      cautions: [found.caution],
      scene: { rate: found.rate, rateText: rate, low, high, threshold: found.threshold, unit: found.unit },
    };
  },
});
