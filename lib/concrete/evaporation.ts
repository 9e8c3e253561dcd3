import { between, finite, notNegative } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { atLeast } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';

const uno = trailSource('P. J. Uno, ACI Materials Journal 95-M34', '1998', 'seen');
const unoUs = trailSource('P. J. Uno, ACI Materials Journal 95-M34; ACI 305R', '1998', 'memory');
const hover = trailSource('K. C. Hover, on estimating evaporation', '2020', 'seen');
const threshold = trailSource('ACI 305R and ACI 308', '', 'seen');
const windHeight = trailSource('Uno; ACI 305', '', 'seen');

/** Actual against estimated evaporation, ± %, Hover 2020. */
export const EVAPORATION_UNCERTAINTY_PERCENT = 40;

export const EVAPORATION_CAUTION =
  'Advice for the time of placing. Actual evaporation may be 40 % more or less than the estimate.';

/** An evaporation rate with what it is to be compared with, both in the same unit. */
export interface EvaporationEstimate {
  rate: number;
  unit: 'kg/m²/h' | 'lb/ft²/h';
  /** The rate less and plus its stated uncertainty. */
  range: { low: number; high: number };
  threshold: number;
  /** `over` from the threshold on, `maybe` where only the upper end of the range reaches it. */
  advice: 'below' | 'maybe' | 'over';
  caution: string;
  trail: TrailStep[];
}

function estimate(
  rate: number,
  unit: EvaporationEstimate['unit'],
  limit: number,
  trail: TrailStep[],
): EvaporationEstimate {
  const part = (Math.abs(rate) * EVAPORATION_UNCERTAINTY_PERCENT) / 100;
  const range = { low: rate - part, high: rate + part };
  return {
    rate,
    unit,
    range,
    threshold: limit,
    advice: atLeast(rate, limit) ? 'over' : atLeast(range.high, limit) ? 'maybe' : 'below',
    caution: EVAPORATION_CAUTION,
    trail: [
      ...trail,
      windHeight('Wind is measured above the surface at', '0.5 m'),
      hover('Uncertainty of the estimate', `± ${EVAPORATION_UNCERTAINTY_PERCENT} %`),
      threshold('Protect the surface from', `${numberText(limit, 2)} ${unit}`),
    ],
  };
}

/**
 * Evaporation from the surface of fresh concrete, Uno 1998:
 * E = 5 ((Tc + 18)^2.5 − r (Ta + 18)^2.5) (V + 4) × 1e-6 in kg/m²/h. Below zero water condenses instead.
 * @param weather concrete and air temperature (°C), relative humidity as a share 0 to 1, wind (km/h)
 * @param silicaFume halves the threshold of 1.0 kg/m²/h
 * @throws ConcreteError where a temperature is outside −18 to 60 °C, or humidity is not a share
 */
export function evaporationRate(
  weather: { concreteC: number; airC: number; humidity: number; windKmh: number },
  silicaFume: boolean,
): EvaporationEstimate {
  const tc = between('concrete temperature', weather.concreteC, -18, 60);
  const ta = between('air temperature', weather.airC, -18, 60);
  const r = humidityShare(weather.humidity);
  const v = notNegative('wind', weather.windKmh);
  const rate = 5 * ((tc + 18) ** 2.5 - r * (ta + 18) ** 2.5) * (v + 4) * 1e-6;
  const shown = [tc, r, ta, v].map((value) => numberText(value, 3));
  const value = `5 ((${shown[0]} + 18)^2.5 − ${shown[1]} (${shown[2]} + 18)^2.5) (${shown[3]} + 4) × 1e-6 = ${numberText(rate, 3)}`;
  return estimate(rate, 'kg/m²/h', silicaFume ? 0.5 : 1, [
    uno('E = 5 ((Tc + 18)^2.5 − r (Ta + 18)^2.5) (V + 4) × 1e-6', `${value} kg/m²/h`),
  ]);
}

/**
 * The same in US units: E = (Tc^2.5 − r Ta^2.5)(1 + 0.4 V) × 1e-6 in lb/ft²/h, from memory, check against the edition in
 * force; threshold 0.2 lb/ft²/h, halved with silica fume. It differs a little from the metric form.
 * @param weather temperatures (°F), relative humidity as a share 0 to 1, wind (mph)
 */
export function evaporationRateUs(
  weather: { concreteF: number; airF: number; humidity: number; windMph: number },
  silicaFume: boolean,
): EvaporationEstimate {
  const tc = between('concrete temperature', weather.concreteF, 0, 140);
  const ta = between('air temperature', weather.airF, 0, 140);
  const r = humidityShare(weather.humidity);
  const v = notNegative('wind', weather.windMph);
  const rate = (tc ** 2.5 - r * ta ** 2.5) * (1 + 0.4 * v) * 1e-6;
  const shown = [tc, r, ta, v].map((value) => numberText(value, 3));
  const value = `(${shown[0]}^2.5 − ${shown[1]} × ${shown[2]}^2.5)(1 + 0.4 × ${shown[3]}) × 1e-6 = ${numberText(rate, 4)}`;
  return estimate(rate, 'lb/ft²/h', silicaFume ? 0.1 : 0.2, [
    unoUs('E = (Tc^2.5 − r Ta^2.5)(1 + 0.4 V) × 1e-6', `${value} lb/ft²/h`),
  ]);
}

function humidityShare(humidity: number): number {
  finite('relative humidity', humidity);
  if (humidity > 1 && humidity <= 100) {
    throw new ConcreteError('relative humidity', 'It is a share from 0 to 1, so 50 % is 0.5.');
  }
  return between('relative humidity', humidity, 0, 1);
}
