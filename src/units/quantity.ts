/** Plain-number aliases that say the unit in a signature. Inside the program: metres, radians, seconds, newtons. */

/** A length in metres. */
export type Metres = number
/** An angle in radians, anticlockwise positive (a turn to the left is positive). */
export type Radians = number
/** An angle in degrees, only in files and on screen, in fields whose name says so. */
export type Degrees = number
/** A time in seconds. */
export type Seconds = number
/** A speed in metres per second. */
export type MetresPerSecond = number
/** A force in newtons. */
export type Newtons = number
/** Rise over run, up positive: 1:12 is 0.0833. */
export type Gradient = number
/** A sound level in dB(A). */
export type Decibels = number
