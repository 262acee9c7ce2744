/**
 * From torque and angle, force and displacement to stress and strain: the specimen's geometry and the corrections for
 * what the instrument adds.
 *
 * <p>Formulas: ISO 3219, ISO 6721 parts 2 to 12, ASTM D4440, D5023, D5024, D5026, D5279, D5418; Saint-Venant's torsion
 * and beam theory as in Timoshenko; sample inertia after Schrag (1977).
 */
package nightlag.stages.geometry;
