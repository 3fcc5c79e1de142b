/*
 * The rival of the kernel bench: a plain scalar loop over points, sets and segments, written the way one would write
 * it by hand, with the formula of src/field/segment.ts.
 *
 * kernel-rival INPUT OUTPUT RUNS reads the sizes and arrays that kernel-rival.ts writes, writes re and im of x, y, z of
 * each point, and prints the CPU seconds of each run after a first one that is not counted.
 */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

static const double SCALE = 1.25663706127e-6 / (4 * 3.14159265358979323846);

static double inside_inverse(double c2, double l2, double r2, double product, double inner, double overhang2) {
  if (overhang2 >= 0) return fmin(1, overhang2 / r2) / (product + inner);
  return inner < 0 ? (product - inner) / (l2 * r2) : c2 / (l2 * r2 * (product + inner));
}

static void fill_phasor_field(const double *rows, const int *set_starts, int sets, const double *currents,
                              const double *points, int count, double *out) {
  for (int p = 0; p < count; p++) {
    double x = points[3 * p], y = points[3 * p + 1], z = points[3 * p + 2];
    double field[6] = {0};
    for (int set = 0; set < sets; set++) {
      double gx = 0, gy = 0, gz = 0;
      for (int i = set_starts[set]; i < set_starts[set + 1]; i++) {
        const double *row = rows + 8 * i;
        double ax = x - row[0], ay = y - row[1], az = z - row[2];
        double bx = x - row[3], by = y - row[4], bz = z - row[5];
        double lx = row[3] - row[0], ly = row[4] - row[1], lz = row[5] - row[2];
        double r2 = row[6] * row[6];
        double a2 = ax * ax + ay * ay + az * az;
        double b2 = bx * bx + by * by + bz * bz;
        int near_start = a2 <= b2;
        double sx = near_start ? ax : bx, sy = near_start ? ay : by, sz = near_start ? az : bz;
        double cx = ly * sz - lz * sy, cy = lz * sx - lx * sz, cz = lx * sy - ly * sx;
        double c2 = cx * cx + cy * cy + cz * cz;
        double l2 = lx * lx + ly * ly + lz * lz;
        double a = sqrt(a2), b = sqrt(b2);
        double product = a * b;
        double inner = ax * bx + ay * by + az * bz;
        double inverse;
        if (c2 < r2 * l2) {
          if (product == 0) continue;
          int past_start = ax * lx + ay * ly + az * lz < 0;
          int past_end = bx * lx + by * ly + bz * lz > 0;
          inverse = inside_inverse(c2, l2, r2, product, inner, past_start ? a2 : past_end ? b2 : -1);
        } else {
          inverse = inner < 0 ? (product - inner) / c2 : 1 / (product + inner);
        }
        double k = SCALE * row[7] * (a + b) * inverse / product;
        gx += k * cx;
        gy += k * cy;
        gz += k * cz;
      }
      double re = currents[2 * set], im = currents[2 * set + 1];
      field[0] += re * gx;
      field[1] += im * gx;
      field[2] += re * gy;
      field[3] += im * gy;
      field[4] += re * gz;
      field[5] += im * gz;
    }
    for (int i = 0; i < 6; i++) out[6 * p + i] = field[i];
  }
}

static void *read_array(FILE *file, size_t size, size_t count) {
  void *array = malloc(size * count);
  if (!array || fread(array, size, count, file) != count) {
    fprintf(stderr, "kernel-rival: the input is too short.\n");
    exit(1);
  }
  return array;
}

int main(int argc, char **argv) {
  if (argc != 4) return 2;
  FILE *file = fopen(argv[1], "rb");
  if (!file) return 1;
  int *sizes = read_array(file, sizeof(int), 4);
  int sets = sizes[0], segments = sizes[1], count = sizes[2];
  int *set_starts = read_array(file, sizeof(int), sets + 1);
  double *rows = read_array(file, sizeof(double), 8 * (size_t)segments);
  double *currents = read_array(file, sizeof(double), 2 * (size_t)sets);
  double *points = read_array(file, sizeof(double), 3 * (size_t)count);
  fclose(file);
  double *out = malloc(6 * sizeof(double) * count);
  if (!out) return 1;
  for (int run = 0; run <= atoi(argv[3]); run++) {
    clock_t start = clock();
    fill_phasor_field(rows, set_starts, sets, currents, points, count, out);
    if (run > 0) printf("%.6f\n", (double)(clock() - start) / CLOCKS_PER_SEC);
  }
  FILE *result = fopen(argv[2], "wb");
  if (!result || fwrite(out, sizeof(double), 6 * (size_t)count, result) != 6 * (size_t)count) return 1;
  return fclose(result);
}
