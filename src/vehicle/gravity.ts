/** Standard acceleration of gravity, m/s^2 (3rd CGPM, 1901; ISO 80000-3). */
export const STANDARD_GRAVITY_MPS2 = 9.80665;
