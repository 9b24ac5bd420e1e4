/**
 * The inside of a vessel's bottom, standing upright and round. Heights count from its lowest point, in m;
 * the cylinder of the shell begins at `height`, a straight flange included.
 */
export interface Bottom {
  /** of the shell inside, m */
  readonly diameter: number;
  /** m; 0 for a flat bottom */
  readonly height: number;
  /** m^3 below a level from 0 to `height` */
  volumeBelow(level: number): number;
  /** m^2 of wall below a level from 0 to `height`; a flat bottom's disc is not counted */
  areaBelow(level: number): number;
}

/**
 * A flat bottom: the shell alone. Its disc counts as no wall, which is the cautious side for a jacket.
 *
 * @param diameter inside, m
 */
export function flatBottom(diameter: number): Bottom {
  return { diameter, height: 0, volumeBelow: () => 0, areaBelow: () => 0 };
}

/**
 * Half an ellipsoid of revolution. With u the depth below its rim and x the radius there,
 * x = a sqrt(1 - u^2/h^2) with a = D/2, so that V = pi a^2 Int(1 - u^2/h^2) du and
 * A = 2 pi a Int sqrt(1 + (a^2 - h^2) u^2/h^4) du, both in closed form.
 *
 * @param diameter inside, m; > 0
 * @param height m; a quarter of the diameter for the 2:1 head, more than half of it for a pointed one
 */
export function ellipsoidalBottom(diameter: number, height: number = diameter / 4): Bottom {
  const a = diameter / 2;
  const flatness = (a * a - height * height) / height ** 4;
  const slope = Math.sqrt(Math.abs(flatness));
  const volumeTo = (u: number) => Math.PI * a * a * u * (1 - (u * u) / (3 * height * height));
  const areaTo = (u: number) => {
    const x = slope * u;
    const arc = flatness > 0 ? Math.asinh(x) : Math.asin(Math.min(1, x));
    const turned = slope === 0 ? u : arc / slope;
    return Math.PI * a * (u * Math.sqrt(Math.max(0, 1 + flatness * u * u)) + turned);
  };
  return {
    diameter,
    height,
    volumeBelow: (level) => volumeTo(height) - volumeTo(height - level),
    areaBelow: (level) => areaTo(height) - areaTo(height - level),
  };
}

/**
 * A dish (spherical cap of radius R) that a knuckle (part of a torus of radius r) joins to the shell, tangent
 * at both ends. The knuckle's centre circle has the radius c = D/2 - r; dish and knuckle meet where the
 * angle from the axis is asin(c/(R - r)).
 *
 * @param diameter inside, m; > 0
 * @param dishRadius R inside, m; at least half the diameter
 * @param knuckleRadius r inside, m; above 0, at most half the diameter
 * @throws RangeError where no such head exists
 */
export function torisphericalBottom(diameter: number, dishRadius: number, knuckleRadius: number): Bottom {
  const centre = diameter / 2 - knuckleRadius;
  const reach = dishRadius - knuckleRadius;
  if (!(knuckleRadius > 0 && centre >= 0 && reach >= centre)) {
    throw new RangeError(`No head of ${diameter} m has the radii ${dishRadius} m and ${knuckleRadius} m`);
  }
  const angle = centre === 0 ? 0 : Math.asin(Math.min(1, centre / reach));
  const seam = 2 * dishRadius * Math.sin(angle / 2) ** 2;
  const knuckleHeight = knuckleRadius * Math.cos(angle);
  const height = seam + knuckleHeight;
  const dishVolume = (level: number) => Math.PI * level * level * (dishRadius - level / 3);
  // Of the knuckle, from a depth u below its upper rim up to that rim: x = c + sqrt(r^2 - u^2).
  const knuckleArc = (u: number) => Math.asin(Math.min(1, u / knuckleRadius));
  const knuckleVolume = (u: number) => {
    const half = Math.sqrt(Math.max(0, knuckleRadius ** 2 - u * u));
    const segment = u * half + knuckleRadius ** 2 * knuckleArc(u);
    return Math.PI * (centre * centre * u + centre * segment + knuckleRadius ** 2 * u - u ** 3 / 3);
  };
  const knuckleArea = (u: number) => 2 * Math.PI * knuckleRadius * (centre * knuckleArc(u) + u);
  return {
    diameter,
    height,
    volumeBelow: (level) =>
      level <= seam
        ? dishVolume(level)
        : dishVolume(seam) + knuckleVolume(knuckleHeight) - knuckleVolume(height - level),
    areaBelow: (level) =>
      level <= seam
        ? 2 * Math.PI * dishRadius * level
        : 2 * Math.PI * dishRadius * seam + knuckleArea(knuckleHeight) - knuckleArea(height - level),
  };
}

/** Dish and knuckle radius of the two DIN forms as parts of the outer diameter. */
export const dinForms = {
  /** DIN 28011 */
  kloepper: { dish: 1, knuckle: 0.1 },
  /** DIN 28013 */
  korbbogen: { dish: 0.8, knuckle: 0.154 },
} as const;

/**
 * Radii inside of a head of DIN 28011 (Kloepper) or DIN 28013 (Korbbogen), which both norms give as parts of
 * the outer diameter of the shell.
 *
 * @param form which of the two
 * @param diameter of the shell inside, m
 * @param wallThickness m
 * @returns dish and knuckle radius, m
 * @see DIN 28011, r1 = Da, r2 = 0.1 Da; DIN 28013, r1 = 0.8 Da, r2 = 0.154 Da
 */
export function dinRadii(
  form: keyof typeof dinForms,
  diameter: number,
  wallThickness: number,
): { readonly dish: number; readonly knuckle: number } {
  const outer = diameter + 2 * wallThickness;
  return {
    dish: dinForms[form].dish * outer,
    knuckle: dinForms[form].knuckle * outer,
  };
}
