/*
 * The loop of lib/physics/simulate/integrate.ts once more in C, for comparison of speed and of results. Reads from its
 * arguments: number of runs, steps, then the constants in the order of `struct axis`. Prints the fastest run in ns per
 * step and the final state.
 */
#define _POSIX_C_SOURCE 199309L
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

#define REGULATOR_RATE 20000.0
#define STATES 6
#ifndef M_PI
#define M_PI 3.14159265358979323846
#endif

struct axis {
  double teeth, peak, voltage_rate, resistance_rate, emf_rate, ke, damping, steady, friction, friction_squared, detent,
      rotor_inertia, load_inertia, stiffness, coupling_damping, speed, acceleration, jerk, step;
};

struct command {
  double a, b, feed_a, feed_b, phase, speed;
};

struct seen {
  double largest_lag, largest_time, broke, short_time;
};

#ifdef LIBRARY_SINE
static inline void sine_cosine(double x, double *s, double *c) {
  *s = sin(x);
  *c = cos(x);
}
#else
static inline void sine_cosine(double x, double *out_s, double *out_c) {
  double quarter = floor(x * (2 / M_PI) + 0.5);
  double r = x - quarter * 1.57079632673412561417 - quarter * 6.07710050650619224932e-11;
  double q = r * r;
  double s = r * (1 + q * (-1.0 / 6 + q * (1.0 / 120 + q * (-1.0 / 5040 + q * (1.0 / 362880 + q * (-1.0 / 39916800 + q * (1.0 / 6227020800.0 + q * (-1.0 / 1307674368000.0))))))));
  double c = 1 + q * (-1.0 / 2 + q * (1.0 / 24 + q * (-1.0 / 720 + q * (1.0 / 40320 + q * (-1.0 / 3628800 + q * (1.0 / 479001600 + q * (-1.0 / 87178291200.0 + q * (1.0 / 20922789888000.0))))))));
  int n = (int)quarter;
  int odd = n & 1;
  *out_s = (n & 2) ? (odd ? -c : -s) : odd ? c : s;
  *out_c = ((n + 1) & 2) ? (odd ? -s : -c) : odd ? s : c;
}
#endif

static inline double clipped(double value, double most) { return value > most ? most : value < -most ? -most : value; }

static inline double resisting(const struct axis *p, double speed) {
  return p->steady + p->friction * speed / sqrt(speed * speed + p->friction_squared);
}

static void set_command(const struct axis *p, struct command *to, double tau) {
  double speed = p->speed + tau * (p->acceleration + tau * p->jerk / 2);
  double angle = tau * (p->speed + tau * (p->acceleration / 2 + tau * p->jerk / 6));
  double s, c;
  sine_cosine(p->teeth * angle, &s, &c);
  to->a = p->peak * c;
  to->b = p->peak * s;
  to->feed_a = -p->teeth * speed * to->b;
  to->feed_b = p->teeth * speed * to->a;
  to->phase = p->teeth * angle;
  to->speed = speed;
}

static void rates(const struct axis *p, const double *y, const struct command *to, double *rate) {
  double s, c, a = y[0], b = y[1], speed = y[3];
  sine_cosine(p->teeth * y[2], &s, &c);
  double own_a = p->resistance_rate * a - p->emf_rate * speed * s;
  double own_b = p->resistance_rate * b + p->emf_rate * speed * c;
  double want_a = to->feed_a + REGULATOR_RATE * (to->a - a);
  double want_b = to->feed_b + REGULATOR_RATE * (to->b - b);
  rate[0] = clipped(want_a + own_a, p->voltage_rate) - own_a;
  rate[1] = clipped(want_b + own_b, p->voltage_rate) - own_b;
  rate[2] = speed;
  double magnetic = p->ke * (b * c - a * s) - 4 * p->detent * s * c * (c * c - s * s) - p->damping * (speed - to->speed);
  if (p->load_inertia > 0) {
    double between = p->stiffness * (y[2] - y[4]) + p->coupling_damping * (speed - y[5]);
    rate[3] = (magnetic - between) / p->rotor_inertia;
    rate[4] = y[5];
    rate[5] = (between - resisting(p, y[5])) / p->load_inertia;
  } else
    rate[3] = (magnetic - resisting(p, speed)) / p->rotor_inertia;
}

static void observe(const struct axis *p, const double *y, const struct command *now, double time, struct seen *seen) {
  double lag = fabs(now->phase - p->teeth * y[2]);
  if (lag > seen->largest_lag) {
    seen->largest_lag = lag;
    seen->largest_time = time;
    if (lag > M_PI && seen->broke < 0) seen->broke = time;
  } else if (lag < M_PI / 2 && seen->largest_lag < 2 * M_PI)
    seen->broke = -1;
  double gap = fabs(now->a - y[0]) + fabs(now->b - y[1]);
  if (gap > 0.05 * p->peak) seen->short_time += p->step;
}

static void integrate(const struct axis *p, double *y, struct seen *seen, long steps) {
  int states = p->load_inertia > 0 ? STATES : STATES - 2;
  double h = p->step, rate[STATES], sum[STATES], trial[STATES];
  struct command begin, middle, end;
  set_command(p, &begin, 0);
  for (long count = 0; count < steps; count++) {
    double tau = count * h;
    set_command(p, &middle, tau + h / 2);
    set_command(p, &end, tau + h);
    rates(p, y, &begin, rate);
    for (int i = 0; i < states; i++) sum[i] = rate[i], trial[i] = y[i] + h / 2 * rate[i];
    rates(p, trial, &middle, rate);
    for (int i = 0; i < states; i++) sum[i] += 2 * rate[i], trial[i] = y[i] + h / 2 * rate[i];
    rates(p, trial, &middle, rate);
    for (int i = 0; i < states; i++) sum[i] += 2 * rate[i], trial[i] = y[i] + h * rate[i];
    rates(p, trial, &end, rate);
    for (int i = 0; i < states; i++) y[i] += h / 6 * (sum[i] + rate[i]);
    begin = end;
    observe(p, y, &begin, tau + h, seen);
  }
}

static double now_ns(void) {
  struct timespec t;
  clock_gettime(CLOCK_MONOTONIC, &t);
  return t.tv_sec * 1e9 + t.tv_nsec;
}

int main(int argc, char **argv) {
  struct axis p;
  int fields = sizeof p / sizeof(double);
  if (argc != 3 + fields) return 2;
  int runs = atoi(argv[1]);
  long steps = atol(argv[2]);
  for (int i = 0; i < fields; i++) ((double *)&p)[i] = atof(argv[3 + i]);
  double best = INFINITY, y[STATES];
  struct seen seen;
  for (int run = 0; run < runs; run++) {
    for (int i = 0; i < STATES; i++) y[i] = 0;
    y[0] = p.peak;
    seen = (struct seen){0, 0, -1, 0};
    double start = now_ns();
    integrate(&p, y, &seen, steps);
    double took = (now_ns() - start) / steps;
    if (took < best) best = took;
  }
  printf("%.17g %.17g %.17g %.17g %.17g %.17g %.17g\n", best, y[0], y[1], y[2], y[3], seen.largest_lag, seen.short_time);
  return 0;
}
