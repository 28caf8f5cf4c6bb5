import { InputError } from '../errors.ts'

/**
 * Static rate [N/m] at which a load vibrates vertically with a wanted frequency on its spring:
 * (2 pi f)² F / g over the dynamic ratio.
 * @param frequency [Hz]
 * @param load [N]
 * @param dynamicRatio dynamic over static stiffness: 1 for steel
 * @param gravity [m/s²]
 * @throws InputError when a figure is not above zero
 * @example rateForFrequency(5, 1000) // 100641.9...
 */
export function rateForFrequency(
  frequency: number,
  load: number,
  dynamicRatio = 1,
  gravity = 9.80665,
): number {
  for (const [field, value] of Object.entries({ frequency, load, dynamicRatio, gravity })) {
    if (!(value > 0 && Number.isFinite(value))) throw new InputError(field, value, 'must be greater than 0')
  }
  return ((2 * Math.PI * frequency) ** 2 * load) / gravity / dynamicRatio
}
