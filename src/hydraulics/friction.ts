/** Mean speed in m/s of water that runs freely, from the hydraulic radius in metres and the slope in m/m. */
export type SpeedLaw = (radius: number, slope: number) => number;

/** Manning. Roughness in s/m^(1/3): 0.009 smooth plastic, 0.012 plastic in service, 0.013 cast iron or clay (handbooks, from memory). */
export const manning =
  (roughness: number): SpeedLaw =>
  (radius, slope) =>
    (radius ** (2 / 3) * Math.sqrt(slope)) / roughness;

/** Manning turned round: the slope at which water of this radius runs at `speed`. */
export const manningSlope = (roughness: number, radius: number, speed: number): number =>
  ((speed * roughness) / radius ** (2 / 3)) ** 2;

/** Colebrook and White, with four times the hydraulic radius for the diameter. Roughness in metres, viscosity in m2/s. */
export const colebrookWhite =
  (roughness: number, viscosity: number): SpeedLaw =>
  (radius, slope) => {
    const shear = Math.sqrt(8 * gravity * radius * slope);
    return -2 * shear * Math.log10(roughness / (3.71 * 4 * radius) + (2.51 * viscosity) / (4 * radius * shear));
  };

const gravity = 9.81;
