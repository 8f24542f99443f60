// The textbook way to brim levels: flooding inwards from the rim with a priority queue, and a plain queue for cells
// that lie below the water that reaches them (Barnes, Lehman & Mulla 2014, Computers & Geosciences 62, algorithm 2).
// Levels only, eight neighbours, no voids. Reads raw float32, row-major; writes the levels the same way; prints the
// time of the flood alone as JSON.
//
//     textbook-flood WIDTH HEIGHT ELEVATION-FILE LEVEL-FILE

#include <chrono>
#include <cstdint>
#include <cstdio>
#include <cstdlib>
#include <queue>
#include <vector>

struct Cell {
  float level;
  uint32_t index;
};

struct Higher {
  bool operator()(const Cell &a, const Cell &b) const { return a.level > b.level; }
};

static void flood(std::vector<float> &z, int width, int height) {
  std::vector<uint8_t> closed(z.size(), 0);
  std::priority_queue<Cell, std::vector<Cell>, Higher> open;
  std::queue<uint32_t> pit;
  auto enter = [&](int row, int column) {
    const uint32_t index = uint32_t(row) * width + column;
    if (closed[index]) return;
    closed[index] = 1;
    open.push({z[index], index});
  };
  for (int column = 0; column < width; column++) {
    enter(0, column);
    enter(height - 1, column);
  }
  for (int row = 0; row < height; row++) {
    enter(row, 0);
    enter(row, width - 1);
  }
  while (!open.empty() || !pit.empty()) {
    uint32_t index;
    if (!pit.empty()) {
      index = pit.front();
      pit.pop();
    } else {
      index = open.top().index;
      open.pop();
    }
    const float level = z[index];
    const int row = index / width;
    const int column = index % width;
    for (int r = row - 1; r <= row + 1; r++) {
      if (r < 0 || r >= height) continue;
      for (int c = column - 1; c <= column + 1; c++) {
        if (c < 0 || c >= width) continue;
        const uint32_t beside = uint32_t(r) * width + c;
        if (closed[beside]) continue;
        closed[beside] = 1;
        if (z[beside] <= level) {
          z[beside] = level;
          pit.push(beside);
        } else {
          open.push({z[beside], beside});
        }
      }
    }
  }
}

static int fail(const char *what, const char *which) {
  std::fprintf(stderr, "%s %s\n", what, which);
  return 1;
}

int main(int count, char **given) {
  if (count != 5) return fail("expected WIDTH HEIGHT ELEVATION-FILE LEVEL-FILE after", given[0]);
  const int width = std::atoi(given[1]);
  const int height = std::atoi(given[2]);
  std::vector<float> z(size_t(width) * height);
  std::FILE *file = std::fopen(given[3], "rb");
  if (!file) return fail("cannot open", given[3]);
  const size_t read = std::fread(z.data(), sizeof(float), z.size(), file);
  std::fclose(file);
  if (read != z.size()) return fail("too few values in", given[3]);
  const auto start = std::chrono::steady_clock::now();
  flood(z, width, height);
  const std::chrono::duration<double> taken = std::chrono::steady_clock::now() - start;
  file = std::fopen(given[4], "wb");
  if (!file) return fail("cannot write", given[4]);
  const size_t written = std::fwrite(z.data(), sizeof(float), z.size(), file);
  std::fclose(file);
  if (written != z.size()) return fail("cannot write all of", given[4]);
  std::printf("{\"seconds\": %.6f}\n", taken.count());
  return 0;
}
