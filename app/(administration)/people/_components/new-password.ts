/** No letters or digits that are mistaken for each other when read out or copied by hand. */
const letters = "abcdefghjkmnpqrstuvwxyz23456789";

/** "kx7w-9fqm-…": four groups of four from 31 signs, 79 bits, from the browser's source of randomness. */
export function makePassword(): string {
  const groups = Array.from({ length: 4 }, () => Array.from({ length: 4 }, pick).join(""));
  return groups.join("-");
}

/** Bytes that would favour the first letters are passed over. */
function pick(): string {
  const [byte] = crypto.getRandomValues(new Uint8Array(1));
  const fair = Math.floor(256 / letters.length) * letters.length;
  return byte < fair ? letters[byte % letters.length] : pick();
}
