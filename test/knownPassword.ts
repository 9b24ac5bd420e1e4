import type { PasswordHash } from "../server/password.js";

/** Quick to check; RFC 7914, section 12: scrypt("pleaseletmein", "SodiumChloride", 16384, 8, 1, 64). */
export const password = "pleaseletmein";
export const accessHash: PasswordHash = {
  cost: 16384,
  blockSize: 8,
  parallelization: 1,
  salt: Buffer.from("SodiumChloride"),
  key: Buffer.from(
    "7023bdcb3afd7348461c06cd81fd38ebfda8fbba904f8e3ea9b543f6545da1f2" +
      "d5432955613f0fcf62d49705242a9af9e61e85dc0d651e40dfcf017b45575887",
    "hex",
  ),
};
