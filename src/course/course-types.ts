// Made from schemas/course.schema.json by `npm run types`; do not edit.

/**
 * A lane as a chain of pieces, on which firmware is rehearsed.
 */
export interface Course {
  /**
   * Where editors find this schema.
   */
  $schema?: string;
  /**
   * Version of this file format.
   */
  courseVersion: 1;
  /**
   * Whether the end joins the start; the pieces must then close within 10 mm and 2 degrees.
   */
  closed?: boolean;
  /**
   * Width of the line, across it. [mm]
   */
  lineWidthMm?: number;
  /**
   * The chain, in driving direction, starting at the origin toward +x.
   *
   * @minItems 1
   * @maxItems 2000
   *
   * Items: One piece of the lane.
   */
  pieces: (
    | {
        /**
         * Length of the straight. [mm]
         */
        straightMm: number;
      }
    | {
        /**
         * Centre-line radius. [mm]
         */
        radiusMm: number;
        /**
         * Change of heading, positive to the left. [deg]
         */
        turnDeg: number;
      }
    | {
        /**
         * Length without line. [mm]
         */
        gapMm: number;
      }
    | {
        /**
         * Marks a crossing.
         */
        crossing: true;
      }
    | {
        /**
         * Change of heading, positive to the left. [deg]
         */
        cornerDeg: number;
      }
  )[];
}
