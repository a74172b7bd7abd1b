#define A 1
#else
#if FAST
#define B { 1, 2
#define C "open // end
#define D 4 /* never closed
#define E 5
