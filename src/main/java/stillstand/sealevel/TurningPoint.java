package stillstand.sealevel;

/**
 * A peak or a trough of a curve's central line.
 *
 * @param ageKa its age, ka; the middle of a flat top
 * @param levelMetres the central line there
 * @param prominenceMetres how far the line must fall from a peak on its easier side before it can rise above it, or reach the
 *     curve's end (for a trough: rise before it can fall below it), above 0
 */
public record TurningPoint(double ageKa, double levelMetres, double prominenceMetres) {}
