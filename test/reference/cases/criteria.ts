/** Inputs and expected values of the computed cases of group F, as the reference file writes them. */
export interface BalanceInputs {
  readonly grade_mm_s: number
  readonly rotor_mass_kg: number
  readonly rpm: number
}
export interface BalanceExpected {
  readonly e_per_um: number
  readonly U_per_g_mm: number
  readonly force_N: number
}
export interface OtherSpeedInputs {
  readonly grade_mm_s: number
  readonly rotor_mass_kg: number
  readonly balancing_rpm: number
  readonly running_rpm: number
}
export interface MotionInputs {
  readonly v_rms_mm_s: number
  readonly f_Hz: number
}
export interface MotionExpected {
  readonly d_peak_um: number
}
