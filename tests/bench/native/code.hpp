// The matrix as both programs read it: 32-bit words n, m, rowStart[0..m], colIndex[...], rows first.
#pragma once
#include <cstdio>
#include <cstdlib>
#include <ctime>
#include <vector>

struct Code {
  int n = 0, m = 0;
  std::vector<std::vector<int>> rows, cols;      // bits of a check, checks of a bit
  std::vector<std::vector<int>> rowEdges, colEdges;  // edge numbers, by rows

  explicit Code(const char* path) {
    FILE* file = std::fopen(path, "rb");
    if (!file) std::exit(2);
    std::vector<int> words;
    int word;
    while (std::fread(&word, 4, 1, file) == 1) words.push_back(word);
    std::fclose(file);
    n = words[0];
    m = words[1];
    rows.resize(m), rowEdges.resize(m), cols.resize(n), colEdges.resize(n);
    const int* start = &words[2];
    const int* index = &words[2 + m + 1];
    for (int j = 0; j < m; j++)
      for (int e = start[j]; e < start[j + 1]; e++) {
        rows[j].push_back(index[e]), rowEdges[j].push_back(e);
        cols[index[e]].push_back(j), colEdges[index[e]].push_back(e);
      }
  }
  int edges() const { return rowEdges.back().back() + 1; }
};

// Processor time, so that a busy machine does not count.
inline double cpuSeconds() {
  timespec t;
  clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &t);
  return t.tv_sec + 1e-9 * t.tv_nsec;
}

inline void report(long frames, double seconds, long frameErrors, long iterations) {
  std::printf("{\"frames\":%ld,\"seconds\":%.6f,\"frameErrors\":%ld,\"iterations\":%ld}\n", frames, seconds, frameErrors,
              iterations);
}
