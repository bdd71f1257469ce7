/* A circuit with a memory for the interpreter: resonance at 152.3 kHz, Q 180, whose envelope follows the drive with the
 * ring time Q / (pi f0) = 376.2 us; an ideal detector on a pedestal of 400 counts. Written for the tests of the ring. */
#include <math.h>

static const double f0 = 152300.0, q = 180.0, pi = 3.14159265358979323846;
static double target, level, last_s;

static void follow(double t_s)
{
    level = target + (level - target) * exp(-(t_s - last_s) * pi * f0 / q);
    last_s = t_s;
}

void plant_pwm(double t_s, double f_hz_exact, int count, int r, int on)
{
    double duty = count / (double)(1 << r), x = f_hz_exact / f0;

    follow(t_s);
    target = on ? 2400.0 * sin(pi * duty) / sqrt(1.0 + q * q * (x - 1.0 / x) * (x - 1.0 / x)) : 0.0;
}

int plant_adc(double t_s, int channel)
{
    follow(t_s);
    return channel == 6 ? (int)(400.5 + level) : 0;
}
