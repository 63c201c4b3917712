// What an engineer writes in an afternoon: one frame at a time, adjacency lists, a Mersenne twister, early stopping.
// usage: textbook CODE bf|gb|lms|spa P PARAMETER CAP SECONDS
//   bf, gb: PARAMETER is the threshold;  lms: the factor on the magnitude;  spa: not used.
#include <algorithm>
#include <cmath>
#include <cstring>
#include <random>
#include <string>
#include "code.hpp"

using std::vector;

struct Decoder {
  const Code& code;
  int cap;
  vector<int> word;
  int iterations = 0;
  Decoder(const Code& c, int cap) : code(c), cap(cap), word(c.n) {}
  virtual ~Decoder() = default;
  virtual void start(const vector<int>& received) = 0;
  virtual void iterate() = 0;

  bool satisfied() const {
    for (const auto& row : code.rows) {
      int sum = 0;
      for (int i : row) sum ^= word[i];
      if (sum) return false;
    }
    return true;
  }
  void decode(const vector<int>& received) {
    word = received;
    start(received);
    for (iterations = 0; !satisfied() && iterations < cap; iterations++) iterate();
  }
};

struct BitFlipping : Decoder {
  int threshold;
  vector<int> syndrome;
  BitFlipping(const Code& c, int cap, int threshold) : Decoder(c, cap), threshold(threshold), syndrome(c.m) {}
  void start(const vector<int>&) override {}
  void iterate() override {
    for (int j = 0; j < code.m; j++) {
      int sum = 0;
      for (int i : code.rows[j]) sum ^= word[i];
      syndrome[j] = sum;
    }
    for (int i = 0; i < code.n; i++) {
      int count = 0;
      for (int j : code.cols[i]) count += syndrome[j];
      if (count >= threshold) word[i] ^= 1;
    }
  }
};

struct GallagerB : Decoder {
  int threshold;
  vector<int> y, toCheck, toBit;
  GallagerB(const Code& c, int cap, int threshold)
      : Decoder(c, cap), threshold(threshold), toCheck(c.edges()), toBit(c.edges()) {}
  void start(const vector<int>& received) override {
    y = received;
    for (int i = 0; i < code.n; i++)
      for (int e : code.colEdges[i]) toCheck[e] = y[i];
  }
  void iterate() override {
    for (int j = 0; j < code.m; j++) {
      int sum = 0;
      for (int e : code.rowEdges[j]) sum ^= toCheck[e];
      for (int e : code.rowEdges[j]) toBit[e] = sum ^ toCheck[e];
    }
    for (int i = 0; i < code.n; i++) {
      int disagreeing = 0;
      for (int e : code.colEdges[i]) disagreeing += toBit[e] != y[i];
      for (int e : code.colEdges[i]) toCheck[e] = y[i] ^ (disagreeing - (toBit[e] != y[i]) >= threshold);
      word[i] = y[i] ^ (2 * disagreeing >= (int)code.colEdges[i].size());
    }
  }
};

struct LayeredMinSum : Decoder {
  float factor;
  vector<float> posterior, message, incoming;
  LayeredMinSum(const Code& c, int cap, float factor) : Decoder(c, cap), factor(factor), message(c.edges()) {}
  void start(const vector<int>& received) override {
    posterior.resize(code.n);
    for (int i = 0; i < code.n; i++) posterior[i] = received[i] ? -1.f : 1.f;
    std::fill(message.begin(), message.end(), 0.f);
  }
  void iterate() override {
    for (int j = 0; j < code.m; j++) {
      const auto& row = code.rows[j];
      const auto& edges = code.rowEdges[j];
      incoming.resize(row.size());
      float least = 1e30f, second = 1e30f;
      size_t at = 0;
      bool negative = false;
      for (size_t t = 0; t < row.size(); t++) {
        incoming[t] = posterior[row[t]] - message[edges[t]];
        float magnitude = std::fabs(incoming[t]);
        negative ^= incoming[t] < 0;
        if (magnitude < least) second = least, least = magnitude, at = t;
        else if (magnitude < second) second = magnitude;
      }
      for (size_t t = 0; t < row.size(); t++) {
        float magnitude = factor * (t == at ? second : least);
        message[edges[t]] = negative != (incoming[t] < 0) ? -magnitude : magnitude;
        posterior[row[t]] = incoming[t] + message[edges[t]];
      }
    }
    for (int i = 0; i < code.n; i++) word[i] = posterior[i] < 0;
  }
};

struct SumProduct : Decoder {
  float ratio;
  vector<float> channel, toCheck, toBit, factors;
  SumProduct(const Code& c, int cap, float ratio) : Decoder(c, cap), ratio(ratio), toCheck(c.edges()), toBit(c.edges()) {}
  void start(const vector<int>& received) override {
    channel.resize(code.n);
    for (int i = 0; i < code.n; i++) {
      channel[i] = received[i] ? -ratio : ratio;
      for (int e : code.colEdges[i]) toCheck[e] = channel[i];
    }
  }
  void iterate() override {
    for (int j = 0; j < code.m; j++) {
      const auto& edges = code.rowEdges[j];
      factors.resize(edges.size());
      float product = 1;
      for (size_t t = 0; t < edges.size(); t++) {
        float factor = std::tanh(0.5f * toCheck[edges[t]]);
        if (std::fabs(factor) < 1e-7f) factor = factor < 0 ? -1e-7f : 1e-7f;
        factors[t] = factor;
        product *= factor;
      }
      for (size_t t = 0; t < edges.size(); t++)
        toBit[edges[t]] = 2 * std::atanh(std::min(0.9999999f, std::max(-0.9999999f, product / factors[t])));
    }
    for (int i = 0; i < code.n; i++) {
      float total = channel[i];
      for (int e : code.colEdges[i]) total += toBit[e];
      for (int e : code.colEdges[i]) toCheck[e] = total - toBit[e];
      word[i] = total < 0;
    }
  }
};

int main(int argc, char** argv) {
  if (argc != 7) return 2;
  Code code(argv[1]);
  std::string kind = argv[2];
  double p = std::atof(argv[3]), parameter = std::atof(argv[4]), limit = std::atof(argv[6]);
  int cap = std::atoi(argv[5]);
  Decoder* decoder = kind == "bf"    ? (Decoder*)new BitFlipping(code, cap, (int)parameter)
                     : kind == "gb"  ? (Decoder*)new GallagerB(code, cap, (int)parameter)
                     : kind == "lms" ? (Decoder*)new LayeredMinSum(code, cap, (float)parameter)
                                     : (Decoder*)new SumProduct(code, cap, std::log((1 - p) / p));
  std::mt19937_64 random(1);
  std::uniform_real_distribution<double> uniform(0, 1);
  vector<int> received(code.n);
  long frames = 0, frameErrors = 0, iterations = 0;
  double begin = cpuSeconds(), spent = 0;
  do {
    for (int& bit : received) bit = uniform(random) < p;
    decoder->decode(received);
    frames++;
    iterations += decoder->iterations;
    frameErrors += std::find(decoder->word.begin(), decoder->word.end(), 1) != decoder->word.end();
    spent = cpuSeconds() - begin;
  } while (spent < limit);
  report(frames, spent, frameErrors, iterations);
}
