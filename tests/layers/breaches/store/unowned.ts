import left from 'left-pad'
export const l = left
