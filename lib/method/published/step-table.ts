export type StepShape = 'slab' | 'cylinder'

/** Columns of the table below: Fourier numbers. */
export const STEP_FOURIERS: readonly number[] = [
  0.001, 0.002, 0.005, 0.01, 0.02, 0.03, 0.05, 0.07, 0.1, 0.15, 0.2, 0.3, 0.4, 0.5, 0.6, 0.8, 1, 1.5, 2, 3, 4,
]

export type StepRow = {
  readonly shape: StepShape
  /** Infinity: the surface is at once in step with the air. */
  readonly biot: number
  readonly roots: readonly number[]
  /** Fraction changed, one for each column. */
  readonly changed: readonly number[]
}

/**
 * First roots and fraction changed after a step of the air, summed here from the series in Crank, The Mathematics of
 * Diffusion (1975), ch. 4 and 5, with 4000 terms and checked against a finite-volume solution. Status: derived. These are
 * no printed values; the first roots agree with his Tables 4.1 and 5.2 as remembered.
 */
export const STEP_TABLE: readonly StepRow[] = [
  {
    shape: 'slab',
    biot: Infinity,
    roots: [1.5708, 4.71239, 7.85398, 10.99557, 14.13717, 17.27876],
    changed: [
      0.03568, 0.05046, 0.07979, 0.11284, 0.15958, 0.19544, 0.25231, 0.29854, 0.35682, 0.43695, 0.50409,
      0.61324, 0.69788, 0.76395, 0.81556, 0.8874, 0.93126, 0.97998, 0.99417, 0.99951, 0.99996,
    ],
  },
  {
    shape: 'slab',
    biot: 10,
    roots: [1.42887, 4.3058, 7.22811, 10.20026, 13.21419, 16.25936],
    changed: [
      0.00804, 0.01484, 0.0321, 0.0556, 0.0932, 0.12418, 0.17555, 0.21859, 0.27388, 0.35112, 0.41674, 0.52581,
      0.61359, 0.68498, 0.74316, 0.82927, 0.8865, 0.95911, 0.98527, 0.99809, 0.99975,
    ],
  },
  {
    shape: 'slab',
    biot: 1,
    roots: [0.86033, 3.42562, 6.4373, 9.52933, 12.64529, 15.77128],
    changed: [
      0.00098, 0.00193, 0.00475, 0.00929, 0.01806, 0.0265, 0.04269, 0.05818, 0.0804, 0.11539, 0.1484, 0.2099,
      0.26649, 0.3189, 0.36751, 0.45455, 0.5296, 0.67511, 0.77561, 0.89296, 0.94894,
    ],
  },
  {
    shape: 'cylinder',
    biot: Infinity,
    roots: [2.40483, 5.52008, 8.65373, 11.79153, 14.93092, 18.07106],
    changed: [
      0.07036, 0.09891, 0.15451, 0.21547, 0.29856, 0.35977, 0.45212, 0.52276, 0.60582, 0.70814, 0.78215,
      0.87797, 0.93157, 0.96162, 0.97848, 0.99323, 0.99787, 0.99988, 0.99999, 1.0, 1.0,
    ],
  },
  {
    shape: 'cylinder',
    biot: 10,
    roots: [2.1795, 5.03321, 7.95688, 10.93633, 13.95803, 17.00988],
    changed: [
      0.01605, 0.02956, 0.06359, 0.10925, 0.18062, 0.23774, 0.3289, 0.40167, 0.49002, 0.60295, 0.68832,
      0.80661, 0.87977, 0.92523, 0.95351, 0.98202, 0.99305, 0.99935, 0.99994, 1.0, 1.0,
    ],
  },
  {
    shape: 'cylinder',
    biot: 1,
    roots: [1.25578, 4.07948, 7.1558, 10.27099, 13.3984, 16.53116],
    changed: [
      0.00195, 0.00387, 0.00948, 0.01854, 0.03593, 0.0526, 0.08431, 0.1143, 0.15673, 0.22194, 0.28148,
      0.38664, 0.47618, 0.55262, 0.61789, 0.72125, 0.79665, 0.90757, 0.95799, 0.99132, 0.99821,
    ],
  },
]

/** A slab is half way when D t over its whole thickness squared is this. Source: Crank (1975), from memory. */
export const SLAB_HALF_TIME = 0.0492
