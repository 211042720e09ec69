/** How amplitudes, forms, versions and checks are named. */
import { z } from "zod";

/** `n6k1L0`, or `nXk1L0` for forms valid for many n. */
export const amplitudeKeyPattern = /^n(?:[1-9]\d?|X)k(?:0|[1-9]\d?)L[0-4]$/;
export const amplitudeKeySchema = z.string().regex(amplitudeKeyPattern);

/** `n6k1L0-3`, its second version `n6k1L0-3v2`; a private form has `p` and 16 characters of base32 in place of the number. */
export const formIdPattern =
  /^(n(?:[1-9]\d?|X)k(?:0|[1-9]\d?)L[0-4])-([1-9]\d{0,8}|p[a-z2-7]{16})(?:v([1-9]\d{0,8}))?$/;
export const formIdSchema = z.string().regex(formIdPattern);

/** 26 characters of base32: 128 random bits. */
export const checkIdPattern = /^[a-z2-7]{26}$/;
export const checkIdSchema = z.string().regex(checkIdPattern);
