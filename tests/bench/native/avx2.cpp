// The kernels' own algorithms in C++ with 256-bit vectors, on a circulant: 256 frames a word for bit flipping and
// Gallager B, 32 for layered min-sum. Same lane refill, same draw of patterns; no histogram and no bit errors.
// Compiled for one code: -DDEGREE=17 -DTHRESHOLD=10 (and -DSHIFT=2 -DLARGEST=6 -DCHANNEL=16 for min-sum).
// usage: avx2 CODE bf|gb|lms P CAP SECONDS
#include <immintrin.h>
#include <cmath>
#include <cstdint>
#include <cstring>
#include <string>
#include "code.hpp"

#ifndef SHIFT
#define SHIFT 2
#define LARGEST 6
#define CHANNEL 16
#endif

typedef uint64_t V __attribute__((vector_size(32)));
constexpr int kLanes = 256;
constexpr int kWords = 4;

static V* vectors(size_t count) {
  V* v = (V*)std::aligned_alloc(32, 32 * count);
  std::memset(v, 0, 32 * count);
  return v;
}
static bool any(V v) { return !_mm256_testz_si256((__m256i)v, (__m256i)v); }
static int population(V v) {
  int sum = 0;
  for (int w = 0; w < kWords; w++) sum += __builtin_popcountll(v[w]);
  return sum;
}

// Counting in bit slices, the inputs known at compile time.
template <int N> struct Digits { static constexpr int value = 1 + Digits<N / 2>::value; };
template <> struct Digits<0> { static constexpr int value = 0; };
template <int N> static inline __attribute__((always_inline)) void sum(V* in, V* out) {
  if constexpr (N == 1) {
    out[0] = in[0];
  } else {
    V carry[N / 2 + 1], total = in[0];
    constexpr int adders = (N - 1) / 2;
#pragma GCC unroll 64
    for (int i = 0; i < adders; i++) {
      V a = in[1 + 2 * i], differ = total ^ a, c = in[2 + 2 * i];
      carry[i] = (differ & c) | (~differ & a);
      total = differ ^ c;
    }
    if constexpr ((N - 1) % 2) carry[adders] = total & in[N - 1], total ^= in[N - 1];
    out[0] = total;
    sum<N / 2>(carry, out + 1);
  }
}
template <int K> static inline V atLeast(const V* digits, int threshold) {
  if (threshold >> K) return V{};
  V met = ~V{};
#pragma GCC unroll 8
  for (int k = 0; k < K; k++) met = threshold >> k & 1 ? digits[k] & met : digits[k] | met;
  return met;
}

// xoshiro128++ (Blackman and Vigna 2021), the weight by a cumulative table, distinct positions by multiplication.
struct Patterns {
  uint32_t s[4] = {0x12345678, 0x9abcdef0, 0x0fedcba9, 0x87654321};
  int n;
  uint32_t refused;
  std::vector<uint64_t> table;
  int guide[256];
  static uint32_t rotate(uint32_t x, int k) { return x << k | x >> (32 - k); }
  uint32_t next() {
    uint32_t result = rotate(s[0] + s[3], 7) + s[0], shifted = s[1] << 9;
    s[2] ^= s[0], s[3] ^= s[1], s[1] ^= s[2], s[0] ^= s[3], s[2] ^= shifted, s[3] = rotate(s[3], 11);
    return result;
  }
  Patterns(int n, double p) : n(n), refused((uint32_t)((1ull << 32) % n)) {
    long double below = 0;
    for (int w = 0; w <= n && below < 1 - 1e-18L; w++) {
      below += expl(lgammal(n + 1) - lgammal(w + 1) - lgammal(n - w + 1) + w * logl(p) + (n - w) * logl(1 - p));
      table.push_back(below >= 1 ? ~0ull : (uint64_t)(below * 18446744073709551616.0L));
    }
    for (int top = 0, w = 0; top < 256; top++) {
      while (w < (int)table.size() && table[w] <= (uint64_t)top << 56) w++;
      guide[top] = w;
    }
  }
  int weight() {
    uint64_t high = next(), u = high << 32 | next();
    int w = guide[u >> 56];
    while (w < (int)table.size() && u >= table[w]) w++;
    return w;
  }
  int position() {
    for (;;) {
      uint64_t product = (uint64_t)next() * n;
      if ((uint32_t)product >= refused) return product >> 32;
    }
  }
};

struct Totals {
  long frames = 0, frameErrors = 0, iterations = 0;
};

// Bit flipping and Gallager B share the words, the refill and the ends of frames.
struct Sliced {
  const Code& code;
  int n, cap;
  int offsets[DEGREE];
  V *word, *sums, *received;
  std::vector<V> ring;
  int slot = 0;
  V active{}, fresh{};
  Patterns patterns;
  Totals totals;
  Sliced(const Code& c, double p, int cap)
      : code(c), n(c.n), cap(cap), word(vectors(2 * c.n)), sums(vectors(2 * c.n)), received(vectors(c.n)),
        ring(cap + 2), patterns(c.n, p) {
    for (int t = 0; t < DEGREE; t++) offsets[t] = c.rows[0][t];
  }
  void refill(bool keepsReceived) {
    for (int i = 0; i < n; i++) word[i] &= active;
    for (int w = 0; w < kWords; w++) {
      uint64_t open = ~active[w];
      while (open) {
        int weight = patterns.weight();
        if (weight == 0) {
          totals.frames++;
          continue;
        }
        int lane = 64 * w + __builtin_ctzll(open);
        uint8_t* byte = (uint8_t*)word + (lane >> 3);
        uint8_t bit = 1 << (lane & 7);
        while (weight) {
          uint8_t* at = byte + 32 * (size_t)patterns.position();
          if (!(*at & bit)) *at |= bit, weight--;
        }
        uint64_t one = open & -open;
        active[w] |= one, fresh[w] |= one, ring[slot][w] |= one;
        open ^= one;
      }
    }
    std::memcpy(word + n, word, 32 * (size_t)n);
    if (keepsReceived)
      for (int i = 0; i < n; i++) received[i] = (received[i] & ~fresh) | (word[i] & fresh);
  }
  void settle(V failing, V wrong, V stuck) {
    int oldest = slot - cap;
    if (oldest < 0) oldest += cap + 2;
    failing &= active;
    V ended = (active & ~failing) | (failing & (ring[oldest] | stuck));
    if (!any(ended)) return;
    active &= ~ended;
    totals.frames += population(ended);
    totals.frameErrors += population(ended & wrong);
    for (int age = 0, at = slot; any(ended); age++, at = at ? at - 1 : cap + 1) {
      V found = ring[at] & ended;
      totals.iterations += (long)age * population(found);
      ring[at] &= ~found, ended &= ~found;
    }
  }
  void advance() {
    fresh = V{};
    if (++slot == cap + 2) slot = 0;
  }
};

struct BitFlipping : Sliced {
  V stuck{};
  using Sliced::Sliced;
  void test() {
    V failing{}, wrong{};
    for (int j = 0; j < n; j++) {
      V parity = word[j + offsets[0]];
      wrong |= parity;
#pragma GCC unroll 64
      for (int t = 1; t < DEGREE; t++) parity ^= word[j + offsets[t]];
      sums[j] = sums[j + n] = parity;
      failing |= parity;
    }
    settle(failing, wrong, stuck);
    stuck = V{};
  }
  void step() {
    if (population(active) < kLanes) refill(false);
    test();
    if (kLanes - population(active) >= 80) refill(false), test();
    V flipped{};
    for (int i = 0; i < n; i++) {
      V in[DEGREE], digits[8];
#pragma GCC unroll 64
      for (int t = 0; t < DEGREE; t++) in[t] = sums[i + n - offsets[t]];
      sum<DEGREE>(in, digits);
      V flips = atLeast<Digits<DEGREE>::value>(digits, THRESHOLD) & active;
      flipped |= flips;
      word[i] ^= flips;
      word[i + n] = word[i];
    }
    stuck = active & ~flipped;
    advance();
  }
};

struct GallagerB : Sliced {
  V *sent, *checkCorrections, *edgeCorrections;
  std::vector<uint8_t> marked;
  bool dirty = false;
  GallagerB(const Code& c, double p, int cap)
      : Sliced(c, p, cap), sent(vectors(2 * c.n)), checkCorrections(vectors(2 * c.n)),
        edgeCorrections(vectors((size_t)c.n * DEGREE)), marked(c.n) {}
  void fill() {
    refill(true);
    for (int i = 0; i < n; i++) sent[i] = sent[i + n] = (sent[i] & ~fresh) | (word[i] & fresh);
  }
  void test() {
    V failing{}, wrong{};
    for (int j = 0; j < n; j++) {
      V parity = word[j + offsets[0]], common = sent[j + offsets[0]];
      wrong |= parity;
#pragma GCC unroll 64
      for (int t = 1; t < DEGREE; t++) parity ^= word[j + offsets[t]], common ^= sent[j + offsets[t]];
      failing |= parity;
      sums[j] = sums[j + n] = common ^ ((checkCorrections[j] ^ checkCorrections[j + n]) & ~fresh);
    }
    settle(failing, wrong, V{});
  }
  void step() {
    if (population(active) < kLanes) fill();
    test();
    if (kLanes - population(active) >= 80) fill(), test();
    if (dirty) std::memset(checkCorrections, 0, 64 * (size_t)n), dirty = false;
    V kept = active & ~fresh;
    for (int i = 0; i < n; i++) {
      V inverted = sent[i] ^ received[i], in[DEGREE], digits[8];
      V* corrections = edgeCorrections + (size_t)i * DEGREE;
      V before = marked[i] ? kept : V{};
      if (marked[i]) {
#pragma GCC unroll 64
        for (int t = 0; t < DEGREE; t++) in[t] = sums[i + n - offsets[t]] ^ inverted ^ (corrections[t] & kept);
      } else {
#pragma GCC unroll 64
        for (int t = 0; t < DEGREE; t++) in[t] = sums[i + n - offsets[t]] ^ inverted;
      }
      sum<DEGREE>(in, digits);
      constexpr int K = Digits<DEGREE>::value;
      V reached = atLeast<K>(digits, THRESHOLD), exact = reached & ~atLeast<K>(digits, THRESHOLD + 1) & active;
      word[i] = word[i + n] = received[i] ^ atLeast<K>(digits, (DEGREE + 1) / 2);
      sent[i] = sent[i + n] = received[i] ^ reached;
      marked[i] = any(exact);
      if (!marked[i]) continue;
      dirty = true;
      for (int t = 0; t < DEGREE; t++) {
        V now = (sums[i + n - offsets[t]] ^ inverted ^ (corrections[t] & before)) & exact;
        corrections[t] = now;
        checkCorrections[i + n - offsets[t]] ^= now;
      }
    }
    advance();
  }
};

// Layered min-sum: 32 frames of a signed byte.
struct LayeredMinSum {
  const Code& code;
  int n, cap;
  __m256i *channel, *posterior, *messages;
  uint32_t* decisions;
  uint32_t active = 0, fresh = 0;
  int age[32] = {};
  Patterns patterns;
  Totals totals;
  LayeredMinSum(const Code& c, double p, int cap)
      : code(c), n(c.n), cap(cap), channel((__m256i*)vectors(c.n)), posterior((__m256i*)vectors(c.n)),
        messages((__m256i*)vectors((size_t)c.n * DEGREE)), decisions((uint32_t*)vectors(c.n)), patterns(c.n, p) {}
  static __m256i lanes(uint32_t mask) {
    alignas(32) int8_t bytes[32];
    for (int l = 0; l < 32; l++) bytes[l] = mask >> l & 1 ? -1 : 0;
    return _mm256_load_si256((__m256i*)bytes);
  }
  void decide() {
    for (int i = 0; i < n; i++) {
      __m256i received = _mm256_cmpgt_epi8(_mm256_setzero_si256(), channel[i]);
      decisions[i] = decisions[i + n] = _mm256_movemask_epi8(_mm256_add_epi8(posterior[i], received));
    }
    for (int i = 0; i < 8; i++) decisions[2 * n + i] = decisions[i];
  }
  void refill() {
    __m256i held = lanes(active), plus = _mm256_set1_epi8(CHANNEL);
    for (int i = 0; i < n; i++) channel[i] = _mm256_blendv_epi8(plus, channel[i], held);
    while (~active) {
      int weight = patterns.weight(), lane = __builtin_ctz(~active);
      if (weight == 0) {
        totals.frames++;
        continue;
      }
      while (weight) {
        int8_t* at = (int8_t*)(channel + patterns.position()) + lane;
        if (*at > 0) *at = -*at, weight--;
      }
      active |= 1u << lane, fresh |= 1u << lane, age[lane] = 0;
    }
    __m256i taken = lanes(fresh);
    for (int i = 0; i < n; i++) posterior[i] = _mm256_blendv_epi8(posterior[i], channel[i], taken);
    decide();
  }
  void test() {
    uint32_t wrong = 0, failing = 0;
    for (int i = 0; i < n; i++) wrong |= decisions[i];
    __m256i found = _mm256_setzero_si256();
    for (int j = 0; j < n; j += 8) {
      __m256i parity = _mm256_setzero_si256();
#pragma GCC unroll 64
      for (int t = 0; t < DEGREE; t++)
        parity = _mm256_xor_si256(parity, _mm256_loadu_si256((__m256i*)(decisions + j + code.rows[0][t])));
      if (j + 8 > n)
        for (int k = n - j; k < 8; k++) ((uint32_t*)&parity)[k] = 0;
      found = _mm256_or_si256(found, parity);
    }
    for (int k = 0; k < 8; k++) failing |= ((uint32_t*)&found)[k];
    for (uint32_t rest = active; rest; rest &= rest - 1) {
      int lane = __builtin_ctz(rest);
      if ((failing >> lane & 1) && age[lane] < cap) continue;
      totals.frames++, totals.iterations += age[lane], totals.frameErrors += wrong >> lane & 1;
      active &= ~(1u << lane);
    }
  }
  static __m256i scaled(__m256i m) {
    __m256i shifted = _mm256_and_si256(_mm256_srli_epi16(m, SHIFT), _mm256_set1_epi8(255 >> SHIFT));
    return _mm256_min_epu8(shifted, _mm256_set1_epi8(LARGEST));
  }
  void step() {
    if (~active) refill();
    test();
    if (~active) refill(), test();
    __m256i kept = lanes(~fresh), zero = _mm256_setzero_si256();
    for (int j = 0; j < n; j++) {
      const int* bits = code.rows[j].data();
      __m256i* row = messages + (size_t)j * DEGREE;
      __m256i in[DEGREE], least = _mm256_set1_epi8(-1), second = least, signs = zero;
#pragma GCC unroll 64
      for (int t = 0; t < DEGREE; t++) {
        in[t] = _mm256_sub_epi8(posterior[bits[t]], _mm256_and_si256(row[t], kept));
        __m256i magnitude = _mm256_abs_epi8(in[t]);
        second = _mm256_min_epu8(second, _mm256_max_epu8(least, magnitude));
        least = _mm256_min_epu8(least, magnitude);
        signs = _mm256_xor_si256(signs, in[t]);
      }
      __m256i usual = scaled(least), other = scaled(second);
#pragma GCC unroll 64
      for (int t = 0; t < DEGREE; t++) {
        __m256i magnitude = _mm256_blendv_epi8(usual, other, _mm256_cmpeq_epi8(_mm256_abs_epi8(in[t]), least));
        __m256i sign = _mm256_or_si256(_mm256_xor_si256(signs, in[t]), _mm256_set1_epi8(1));
        row[t] = _mm256_sign_epi8(magnitude, sign);
        posterior[bits[t]] = _mm256_add_epi8(in[t], row[t]);
      }
    }
    decide();
    for (int& a : age) a++;
    fresh = 0;
  }
};

template <class D> static void run(const Code& code, double p, int cap, double limit) {
  D decoder(code, p, cap);
  for (int i = 0; i < 20; i++) decoder.step();
  decoder.totals = {};
  double begin = cpuSeconds(), spent = 0;
  do {
    for (int i = 0; i < 8; i++) decoder.step();
    spent = cpuSeconds() - begin;
  } while (spent < limit);
  report(decoder.totals.frames, spent, decoder.totals.frameErrors, decoder.totals.iterations);
}

int main(int argc, char** argv) {
  if (argc != 6) return 2;
  Code code(argv[1]);
  std::string kind = argv[2];
  double p = std::atof(argv[3]), limit = std::atof(argv[5]);
  int cap = std::atoi(argv[4]);
  if (kind == "bf") run<BitFlipping>(code, p, cap, limit);
  if (kind == "gb") run<GallagerB>(code, p, cap, limit);
  if (kind == "lms") run<LayeredMinSum>(code, p, cap, limit);
}
