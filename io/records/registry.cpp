#include "io/records/record.hpp"
