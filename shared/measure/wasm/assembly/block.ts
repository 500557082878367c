/** How the file is cut up: the same whatever pieces its bytes arrive in. */

/** Frames between two looks at what the samples did: the smallest unit of the quick pass. */
export const granuleFrames: i32 = 64;
export const granulesPerBlock: i32 = 32;
/** Meters see the file in blocks of this many frames, counted from its first frame. */
export const blockFrames: i32 = granuleFrames * granulesPerBlock;
/** Frames of the block before that stay readable in front of the present one. */
export const historyFrames: i32 = 256;
