/*
 * The baseline of the bench: a tape interpreter in C over 2^31-1 with vectors of 128 bits, fed the same tape as the kernel.
 * Input (native 32-bit words): vectors of a block, slots, slots that are given, words of code, milliseconds to run, then the
 * given slots and the code. Output: points per second of processor time, and the sum at the first point.
 */
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

#define P 0x7fffffffu

#if defined(__SSE4_1__)
#include <smmintrin.h>
typedef __m128i vec;
static inline vec splat(uint32_t x) { return _mm_set1_epi32((int)x); }
static inline vec add32(vec a, vec b) { return _mm_add_epi32(a, b); }
static inline vec sub32(vec a, vec b) { return _mm_sub_epi32(a, b); }
static inline vec add64(vec a, vec b) { return _mm_add_epi64(a, b); }
static inline vec min32(vec a, vec b) { return _mm_min_epu32(a, b); }
/* Products of the even and of the odd lanes, 64 bits each. */
static inline vec even(vec a, vec b) { return _mm_mul_epu32(a, b); }
static inline vec odd(vec a, vec b) { return _mm_mul_epu32(_mm_srli_epi64(a, 32), _mm_srli_epi64(b, 32)); }
static inline vec fold(vec x) { return _mm_add_epi64(_mm_and_si128(x, _mm_set1_epi64x(P)), _mm_srli_epi64(x, 31)); }
static inline vec weave(vec e, vec o) { return _mm_or_si128(e, _mm_slli_epi64(o, 32)); }
static inline int anyZero(vec a) { return _mm_movemask_epi8(_mm_cmpeq_epi32(a, _mm_setzero_si128())) != 0; }
static inline vec zeroToOne(vec a) { return _mm_sub_epi32(a, _mm_cmpeq_epi32(a, _mm_setzero_si128())); }
#else
typedef uint32_t vec __attribute__((vector_size(16)));
typedef uint64_t wide __attribute__((vector_size(16)));
static inline vec splat(uint32_t x) { return (vec){x, x, x, x}; }
static inline vec add32(vec a, vec b) { return a + b; }
static inline vec sub32(vec a, vec b) { return a - b; }
static inline vec add64(vec a, vec b) { return (vec)((wide)a + (wide)b); }
static inline vec min32(vec a, vec b) { vec less = (vec)(a < b); return (a & less) | (b & ~less); }
static inline vec even(vec a, vec b) { return (vec)(((wide)a & 0xffffffffu) * ((wide)b & 0xffffffffu)); }
static inline vec odd(vec a, vec b) { return (vec)(((wide)a >> 32) * ((wide)b >> 32)); }
static inline vec fold(vec x) { return (vec)(((wide)x & P) + ((wide)x >> 31)); }
static inline vec weave(vec e, vec o) { return e | (vec)((wide)o << 32); }
static inline int anyZero(vec a) { return !a[0] || !a[1] || !a[2] || !a[3]; }
static inline vec zeroToOne(vec a) { return a - (vec)(a == 0); }
#endif

static inline vec below(vec r) { return min32(r, sub32(r, splat(P))); }
static inline vec add(vec a, vec b) { return below(add32(a, b)); }
static inline vec sub(vec a, vec b) { vec r = sub32(a, b); return min32(r, add32(r, splat(P))); }
static inline vec negate(vec a) { return sub32(splat(P), a); }
static inline vec reduce(vec e, vec o) { return below(weave(fold(fold(e)), fold(fold(o)))); }
static inline vec mul(vec a, vec b) { return below(weave(fold(even(a, b)), fold(odd(a, b)))); }

static inline vec dot2(vec a, vec b, vec c, vec d) {
  return reduce(add64(even(a, b), even(c, d)), add64(odd(a, b), odd(c, d)));
}

static vec power(vec a) {
  vec r = a;
  for (int bit = 29; bit >= 0; bit--) {
    r = mul(r, r);
    if ((P - 2) >> bit & 1) r = mul(r, a);
  }
  return r;
}

static vec *slots, *sum, partial[64];
static uint32_t nv, bad;

/* Runs one entry in place of the letters of the kernel: see opcodes.ts for what the words are. */
static void run(const int32_t *code, const int32_t *end) {
  while (code < end) {
    const int32_t opcode = code[0], count = code[1], parameter = code[2];
    code += 4;
#define SLOT(i) (slots + (size_t)code[i] * nv)
    for (int32_t n = 0; n < count; n++) {
      switch (opcode) {
        case 1: {
          vec *o = SLOT(0), *a = SLOT(1), *b = SLOT(2);
          for (uint32_t j = 0; j < nv; j++) {
            vec a0 = a[j], a1 = a[j + nv], a2 = a[j + 2 * nv], a3 = a[j + 3 * nv];
            vec b0 = b[j], b1 = b[j + nv], b2 = b[j + 2 * nv], b3 = b[j + 3 * nv];
            vec m1 = negate(a1), m2 = negate(a2), m3 = negate(a3);
            o[j] = dot2(a0, b1, m1, b0);
            o[j + nv] = dot2(a0, b2, m2, b0);
            o[j + 2 * nv] = dot2(a0, b3, m3, b0);
            o[j + 3 * nv] = dot2(a1, b2, m2, b1);
            o[j + 4 * nv] = dot2(a3, b1, m1, b3);
            o[j + 5 * nv] = dot2(a2, b3, m3, b2);
          }
          code += 3;
          break;
        }
        case 2: {
          vec *o = SLOT(0), *a = SLOT(1), *b = SLOT(2);
          for (uint32_t j = 0; j < nv; j++) {
            vec e = splat(0), d = splat(0);
            for (int i = 0; i < 6; i++) {
              vec x = a[j + i * nv], y = b[j + (5 - i) * nv];
              if (i == 3) { e = fold(e); d = fold(d); }
              e = add64(e, even(x, y));
              d = add64(d, odd(x, y));
            }
            o[j] = reduce(e, d);
          }
          code += 3;
          break;
        }
        case 6: {
          vec *o = SLOT(0), *a = SLOT(1), *b = SLOT(2);
          for (uint32_t j = 0; j < nv; j++) o[j] = mul(a[j], b[j]);
          code += 3;
          break;
        }
        case 7: {
          /* The whole run is one batch. */
          for (uint32_t j = 0; j < nv; j++) {
            vec product = splat(1);
            for (int32_t i = 0; i < count; i++) {
              vec x = slots[(size_t)code[3 * i + 1] * nv + j];
              if (anyZero(x)) { bad++; x = zeroToOne(x); }
              partial[i] = product;
              product = mul(product, x);
            }
            vec rest = power(product);
            for (int32_t i = count - 1; i >= 0; i--) {
              vec x = zeroToOne(slots[(size_t)code[3 * i + 1] * nv + j]);
              slots[(size_t)code[3 * i] * nv + j] = mul(rest, partial[i]);
              rest = mul(rest, x);
            }
          }
          code += 3 * count;
          n = count;
          break;
        }
        case 10: {
          vec *o = SLOT(0), *s[5], *v[5];
          const int32_t signs = code[1];
          for (int i = 0; i < 5; i++) { s[i] = SLOT(2 + 2 * i); v[i] = SLOT(3 + 2 * i); }
          for (uint32_t j = 0; j < nv; j++) {
            vec x[5];
            for (int i = 0; i < 5; i++) x[i] = signs >> i & 1 ? negate(s[i][j]) : s[i][j];
            for (int32_t w = 0; w < parameter; w++) {
              vec e = splat(0), d = splat(0);
              for (int i = 0; i < 5; i++) {
                if (i == 3) { e = fold(e); d = fold(d); }
                e = add64(e, even(x[i], v[i][j + w * nv]));
                d = add64(d, odd(x[i], v[i][j + w * nv]));
              }
              o[j + w * nv] = reduce(e, d);
            }
          }
          code += 12;
          break;
        }
        case 12: {
          vec *o = SLOT(0), *a = SLOT(1);
          if (parameter != 0) { fprintf(stderr, "only products of four entries, got degree %d\n", parameter); exit(2); }
          for (uint32_t j = 0; j < nv; j++) o[j] = mul(mul(a[j], a[j + nv]), mul(a[j + 2 * nv], a[j + 3 * nv]));
          code += 3;
          break;
        }
        case 13: {
          vec *a = SLOT(0);
          for (uint32_t j = 0; j < nv; j++) sum[j] = code[1] ? sub(sum[j], a[j]) : add(sum[j], a[j]);
          code += 3;
          break;
        }
        default:
          fprintf(stderr, "an operation that W does not use: %d\n", opcode);
          exit(2);
      }
    }
  }
}

static uint32_t word(void) {
  uint32_t x;
  if (fread(&x, 4, 1, stdin) != 1) { fprintf(stderr, "the input ends too early\n"); exit(2); }
  return x;
}

int main(void) {
  nv = word();
  const uint32_t total = word(), given = word(), words = word(), milliseconds = word();
  slots = aligned_alloc(16, (size_t)total * nv * 16);
  sum = aligned_alloc(16, (size_t)nv * 16);
  int32_t *code = malloc(4 * (size_t)words);
  if (!slots || !sum || !code) return 3;
  memset(slots, 0, (size_t)total * nv * 16);
  for (size_t i = 0; i < (size_t)given * nv * 4; i++) ((uint32_t *)slots)[i] = word();
  for (uint32_t i = 0; i < words; i++) code[i] = (int32_t)word();
  memset(sum, 0, (size_t)nv * 16);
  run(code, code + words);
  const uint32_t first = ((uint32_t *)sum)[0];
  uint64_t blocks = 0;
  const clock_t start = clock(), stop = start + (clock_t)milliseconds * (CLOCKS_PER_SEC / 1000);
  clock_t now;
  do {
    for (int i = 0; i < 16; i++) run(code, code + words);
    blocks += 16;
    now = clock();
  } while (now < stop);
  printf("%.1f %u\n", (double)blocks * nv * 4 * CLOCKS_PER_SEC / (double)(now - start), first);
  return bad ? 4 : 0;
}
