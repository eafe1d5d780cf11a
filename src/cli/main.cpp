#include "carlin/job/job.hpp"
int main() { return 3; }
