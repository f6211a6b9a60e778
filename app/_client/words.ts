const numbers = ["No", "One", "Two", "Three", "Four", "Five", "Six", "Seven", "Eight", "Nine"];

/** 3 -> "Three", 24 -> "24": for the beginning of a sentence. */
export const countWord = (count: number) => numbers[count] ?? String(count);
