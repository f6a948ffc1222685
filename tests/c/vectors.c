/*
 * Reads the vectors that every language shares and prints what the C library says, for tests/tests/parity.rs to
 * compare with the file: for each row a line "scalar,..." of the calls with plain numbers and a line "column,..." of
 * calls over many rows, as statuses and as the 16 hexadecimal digits of each number.
 */
#include <floodmark.h>

#include <inttypes.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#define GREEKS 12
#define PROFILE 3

/* What stands in an output before a scalar call. */
static const uint64_t UNTOUCHED = UINT64_C(0x0123456789abcdef);

/* A question to the law as it lies in memory. */
struct law {
    uint8_t quantity;
    double drift, vol, horizon, first, second;
    double value;
    int32_t status;
};

/* A row as it lies in memory: columns are read and written in place, by strides. */
struct row {
    uint8_t code;
    uint8_t rebate_paid;
    double spot, strike, barrier, rebate, expiry, vol, rate, dividend;
    double value;
    double greeks[GREEKS];
    double profile[PROFILE];
    int32_t value_status, greek_status, profile_status;
};

static void fail(const char *why) {
    fprintf(stderr, "%s\n", why);
    exit(1);
}

/* The number in a cell; an empty one is NaN. */
static double number(const char *cell) {
    char *end = NULL;
    double found = strtod(*cell ? cell : "NaN", &end);
    if (*end != '\0') {
        fail(cell);
    }
    return found;
}

/* Cuts a line at its commas; returns the cells, empty ones too. */
static size_t cut(char *line, char *cells[], size_t most) {
    size_t count = 0;
    line[strcspn(line, "\r\n")] = '\0';
    for (char *at = line;; at += 1) {
        if (count == most) {
            fail("too many cells");
        }
        cells[count++] = at;
        at += strcspn(at, ",");
        if (*at == '\0') {
            return count;
        }
        *at = '\0';
    }
}

/* Where the header line has a column. */
static size_t place(char *const names[], size_t count, const char *name) {
    for (size_t n = 0; n < count; n += 1) {
        if (strcmp(names[n], name) == 0) {
            return n;
        }
    }
    fail(name);
    return 0;
}

static void print_bits(const double *numbers, size_t count) {
    for (size_t n = 0; n < count; n += 1) {
        uint64_t bits;
        memcpy(&bits, &numbers[n], sizeof bits);
        printf(",%016" PRIx64, bits);
    }
}

static void fill(double *numbers, size_t count) {
    for (size_t n = 0; n < count; n += 1) {
        memcpy(&numbers[n], &UNTOUCHED, sizeof UNTOUCHED);
    }
}

/* The value alone must be the first of the Greeks, bit for bit and with the same status. */
static void same_value(int32_t status, double value, int32_t greek_status, double of_greeks) {
    if (status != greek_status || memcmp(&value, &of_greeks, sizeof value) != 0) {
        fail("the value alone is not that of the Greeks");
    }
}

static void print_scalar(const struct row *row) {
    double value, numbers[GREEKS], stand[PROFILE];
    FloodmarkGreeks greeks;
    FloodmarkBarrierProfile profile;
    fill(&value, 1);
    fill(numbers, GREEKS);
    fill(stand, PROFILE);
    memcpy(&greeks, numbers, sizeof greeks);
    memcpy(&profile, stand, sizeof profile);
#define ARGUMENTS                                                                                              \
    row->code, row->spot, row->strike, row->barrier, row->rebate, row->rebate_paid, row->expiry, row->vol, \
        row->rate, row->dividend
    int32_t value_status = floodmark_price(ARGUMENTS, &value);
    int32_t greek_status = floodmark_greeks(ARGUMENTS, &greeks);
    int32_t profile_status = floodmark_barrier_profile(ARGUMENTS, &profile);
    same_value(value_status, value, greek_status, greeks.value);
    memcpy(numbers, &greeks, sizeof greeks);
    memcpy(stand, &profile, sizeof profile);
    printf("scalar,%" PRId32, greek_status);
    print_bits(numbers, GREEKS);
    printf(",%" PRId32, profile_status);
    print_bits(stand, PROFILE);
    printf("\n");
}

static void print_column(const struct row *row) {
    same_value(row->value_status, row->value, row->greek_status, row->greeks[0]);
    printf("column,%" PRId32, row->greek_status);
    print_bits(row->greeks, GREEKS);
    printf(",%" PRId32, row->profile_status);
    print_bits(row->profile, PROFILE);
    printf("\n");
}

static void call_columns(struct row *rows, size_t count) {
    const ptrdiff_t step = (ptrdiff_t)(sizeof *rows / sizeof(double));
    const ptrdiff_t status_step = (ptrdiff_t)(sizeof *rows / sizeof(int32_t));
    const ptrdiff_t code_step = (ptrdiff_t)sizeof *rows;
    FloodmarkBook book = {
        count,
        {&rows->code, code_step},
        {&rows->spot, step},
        {&rows->strike, step},
        {&rows->barrier, step},
        {&rows->rebate, step},
        {&rows->rebate_paid, code_step},
        {&rows->expiry, step},
        {&rows->vol, step},
        {&rows->rate, step},
        {&rows->dividend, step},
    };
    FloodmarkGreekColumns greeks = {
        {&rows->greeks[0], step}, {&rows->greeks[1], step}, {&rows->greeks[2], step},  {&rows->greeks[3], step},
        {&rows->greeks[4], step}, {&rows->greeks[5], step}, {&rows->greeks[6], step},  {&rows->greeks[7], step},
        {&rows->greeks[8], step}, {&rows->greeks[9], step}, {&rows->greeks[10], step}, {&rows->greeks[11], step},
    };
    FloodmarkProfileColumns profile = {
        {&rows->profile[0], step}, {&rows->profile[1], step}, {&rows->profile[2], step},
    };
    FloodmarkResults value = {&rows->value, step};
    FloodmarkStatuses value_status = {&rows->value_status, status_step};
    FloodmarkStatuses greek_status = {&rows->greek_status, status_step};
    FloodmarkStatuses profile_status = {&rows->profile_status, status_step};
    if (floodmark_price_columns(&book, value, value_status, NULL) != FLOODMARK_STATUS_OK ||
        floodmark_greeks_columns(&book, &greeks, greek_status, NULL) != FLOODMARK_STATUS_OK ||
        floodmark_barrier_profile_columns(&book, &profile, profile_status, NULL) != FLOODMARK_STATUS_OK) {
        fail("a call over columns was refused");
    }
}

/* The answer of the function that has the quantity's name. */
static int32_t ask(const struct law *law, double *value) {
    const double first = law->first, second = law->second;
    switch (law->quantity) {
#define ONE(QUANTITY, function) \
    case QUANTITY: return function(law->drift, law->vol, law->horizon, first, value)
#define TWO(QUANTITY, function) \
    case QUANTITY: return function(law->drift, law->vol, law->horizon, first, second, value)
        ONE(FLOODMARK_QUANTITY_TERMINAL_PDF, floodmark_terminal_pdf);
        ONE(FLOODMARK_QUANTITY_TERMINAL_CDF, floodmark_terminal_cdf);
        ONE(FLOODMARK_QUANTITY_TERMINAL_QUANTILE, floodmark_terminal_quantile);
        ONE(FLOODMARK_QUANTITY_MAX_PDF, floodmark_max_pdf);
        ONE(FLOODMARK_QUANTITY_MAX_CDF, floodmark_max_cdf);
        ONE(FLOODMARK_QUANTITY_MAX_TAIL, floodmark_max_tail);
        ONE(FLOODMARK_QUANTITY_MAX_QUANTILE, floodmark_max_quantile);
        ONE(FLOODMARK_QUANTITY_MIN_PDF, floodmark_min_pdf);
        ONE(FLOODMARK_QUANTITY_MIN_CDF, floodmark_min_cdf);
        ONE(FLOODMARK_QUANTITY_MIN_TAIL, floodmark_min_tail);
        ONE(FLOODMARK_QUANTITY_MIN_QUANTILE, floodmark_min_quantile);
        TWO(FLOODMARK_QUANTITY_JOINT_MAX_CDF, floodmark_joint_max_cdf);
        TWO(FLOODMARK_QUANTITY_JOINT_MAX_PDF, floodmark_joint_max_pdf);
        TWO(FLOODMARK_QUANTITY_JOINT_MIN_CDF, floodmark_joint_min_cdf);
        TWO(FLOODMARK_QUANTITY_JOINT_MIN_PDF, floodmark_joint_min_pdf);
        ONE(FLOODMARK_QUANTITY_SURVIVAL, floodmark_survival);
        TWO(FLOODMARK_QUANTITY_FIRST_PASSAGE_PDF, floodmark_first_passage_pdf);
        TWO(FLOODMARK_QUANTITY_FIRST_PASSAGE_CDF, floodmark_first_passage_cdf);
        TWO(FLOODMARK_QUANTITY_FIRST_PASSAGE_QUANTILE, floodmark_first_passage_quantile);
        TWO(FLOODMARK_QUANTITY_DISCOUNTED_FIRST_PASSAGE, floodmark_discounted_first_passage);
        TWO(FLOODMARK_QUANTITY_BRIDGE_CROSSING, floodmark_bridge_crossing);
        ONE(FLOODMARK_QUANTITY_SAMPLE_TERMINAL, floodmark_sample_terminal);
        TWO(FLOODMARK_QUANTITY_SAMPLE_MAX, floodmark_sample_max);
        TWO(FLOODMARK_QUANTITY_SAMPLE_MIN, floodmark_sample_min);
        TWO(FLOODMARK_QUANTITY_DRIFT_WEIGHT, floodmark_drift_weight);
    }
    fail("a quantity without a function");
    return -1;
}

static void print_laws(struct law *laws, size_t count) {
    const ptrdiff_t step = (ptrdiff_t)(sizeof *laws / sizeof(double));
    /* One call for each stretch of rows with the same quantity. */
    for (size_t start = 0, end; start < count; start = end) {
        for (end = start; end < count && laws[end].quantity == laws[start].quantity; end += 1) {
        }
        struct law *stretch = &laws[start];
        FloodmarkLawColumns inputs = {
            end - start,           {&stretch->drift, step}, {&stretch->vol, step},
            {&stretch->horizon, step}, {&stretch->first, step}, {&stretch->second, step},
        };
        FloodmarkResults value = {&stretch->value, step};
        FloodmarkStatuses status = {&stretch->status, (ptrdiff_t)(sizeof *laws / sizeof(int32_t))};
        if (floodmark_law_columns(stretch->quantity, &inputs, value, status, NULL) != FLOODMARK_STATUS_OK) {
            fail("a call over columns of the law was refused");
        }
        for (struct law *law = stretch; law < &laws[end]; law += 1) {
            double alone;
            fill(&alone, 1);
            printf("scalar,%" PRId32, ask(law, &alone));
            print_bits(&alone, 1);
            printf("\ncolumn,%" PRId32, law->status);
            print_bits(&law->value, 1);
            printf("\n");
        }
    }
}

#define MOST_CELLS 64
#define MOST_ROWS 10000

int main(int count, char **words) {
    static struct row rows[MOST_ROWS];
    static struct law laws[MOST_ROWS];
    static char head[4096], line[4096];
    char *names[MOST_CELLS], *cells[MOST_CELLS];
    size_t row_count = 0, law_count = 0;
    FILE *file = count == 2 ? fopen(words[1], "r") : NULL;
    if (file == NULL || fgets(head, sizeof head, file) == NULL) {
        fail("usage: vectors FILE");
    }
    size_t columns = cut(head, names, MOST_CELLS);
#define CELL(name) cells[place(names, columns, name)]
    while (fgets(line, sizeof line, file) != NULL) {
        if (cut(line, cells, MOST_CELLS) != columns || row_count + law_count == MOST_ROWS) {
            fail("a row is too long or too short, or there are too many");
        }
        if (strcmp(CELL("kind"), "law") == 0) {
            struct law *law = &laws[law_count++];
            law->quantity = (uint8_t)atoi(CELL("code"));
            law->drift = number(CELL("drift"));
            law->vol = number(CELL("vol"));
            law->horizon = number(CELL("horizon"));
            law->first = number(CELL("first"));
            law->second = number(CELL("second"));
            continue;
        }
        if (strcmp(CELL("kind"), "contract") != 0) {
            fail(CELL("kind"));
        }
        struct row *row = &rows[row_count++];
        row->code = (uint8_t)atoi(CELL("code"));
        uint8_t named = row->code;
        if (*CELL("name") && (floodmark_contract_code(CELL("name"), &named) != 0 || named != row->code)) {
            fail(CELL("name"));
        }
        row->rebate_paid = (uint8_t)atoi(CELL("rebate_paid"));
        row->spot = number(CELL("spot"));
        row->strike = number(CELL("strike"));
        row->barrier = number(CELL("barrier"));
        row->rebate = number(CELL("rebate"));
        row->expiry = number(CELL("expiry"));
        row->vol = number(CELL("vol"));
        row->rate = number(CELL("rate"));
        row->dividend = number(CELL("dividend"));
    }
    fclose(file);
    call_columns(rows, row_count);
    for (size_t n = 0; n < row_count; n += 1) {
        print_scalar(&rows[n]);
        print_column(&rows[n]);
    }
    print_laws(laws, law_count);
    return 0;
}
