/** Two digits and no more: the models know no better. */
export const twoDigits = (value: number): string => String(Number(value.toPrecision(2)));

/** A mould's name inside a sentence. */
export const inSentence = (name: string): string => name.charAt(0).toLowerCase() + name.slice(1);
