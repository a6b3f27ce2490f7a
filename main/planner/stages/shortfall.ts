/** Weight of a stop that no latch can mend against one unit of use, when plans are compared by how far off they are. */
export const unmendable = 1000
