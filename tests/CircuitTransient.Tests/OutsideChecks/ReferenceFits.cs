namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>A reference set of nonlinear regression with its certified result.</summary>
/// <param name="Model">Value and slopes by each parameter.</param>
public sealed record ReferenceFit(
    string Name, double[] X, double[] Y, double[][] Starts, double[] Certified, double[] Deviations,
    double SquareSum, Func<double, double[], (double Value, double[] Slopes)> Model);

/// <summary>Sets of the Statistical Reference Datasets of NIST (public domain facts), as they stand in copies
/// of its data files that were opened: Lanczos3 and MGH10 in the file format itself, Misra1a, MGH09 and
/// Thurber in tables made from it. NIST calls the first two of lower, the last three of higher
/// difficulty.</summary>
public static class ReferenceFits
{
    public static ReferenceFit Misra1a { get; } = new(
        "Misra1a",
        [77.6, 114.9, 141.1, 190.8, 239.9, 289.0, 332.8, 378.4, 434.8, 477.3, 536.8, 593.1, 689.1, 760.0],
        [
            10.07, 14.73, 17.94, 23.93, 29.61, 35.18, 40.02, 44.82, 50.76, 55.05, 61.01, 66.40, 75.47,
            81.78,
        ],
        [[500, 0.0001], [250, 0.0005]],
        [2.3894212918E+02, 5.5015643181E-04],
        [2.7070075241E+00, 7.2668688436E-06],
        1.2455138894E-01,
        (x, b) => (b[0] * -Math.Exp(-b[1] * x) + b[0],
            [1 - Math.Exp(-b[1] * x), b[0] * x * Math.Exp(-b[1] * x)]));

    public static ReferenceFit Lanczos3 { get; } = new(
        "Lanczos3",
        [.. Enumerable.Range(0, 24).Select(i => 0.05 * i)],
        [
            2.5134, 2.0443, 1.6684, 1.3664, 1.1232, 0.9269, 0.7679, 0.6389, 0.5338, 0.4479, 0.3776, 0.3197,
            0.2720, 0.2325, 0.1997, 0.1723, 0.1493, 0.1301, 0.1138, 0.1000, 0.0883, 0.0783, 0.0698, 0.0624,
        ],
        [[1.2, 0.3, 5.6, 5.5, 6.5, 7.6], [0.5, 0.7, 3.6, 4.2, 4, 6.3]],
        [
            8.6816414977E-02, 9.5498101505E-01, 8.4400777463E-01, 2.9515951832E+00, 1.5825685901E+00,
            4.9863565084E+00,
        ],
        [
            1.7197908859E-02, 9.7041624475E-02, 4.1488663282E-02, 1.0766312506E-01, 5.8371576281E-02,
            3.4436403035E-02,
        ],
        1.6117193594E-08,
        (x, b) =>
        {
            double[] decays = [Math.Exp(-b[1] * x), Math.Exp(-b[3] * x), Math.Exp(-b[5] * x)];
            return ((b[0] * decays[0]) + (b[2] * decays[1]) + (b[4] * decays[2]),
                [decays[0], -b[0] * x * decays[0], decays[1], -b[2] * x * decays[1],
                    decays[2], -b[4] * x * decays[2]]);
        });

    public static ReferenceFit Mgh09 { get; } = new(
        "MGH09",
        [4, 2, 1, 0.5, 0.25, 0.167, 0.125, 0.1, 0.0833, 0.0714, 0.0625],
        [0.1957, 0.1947, 0.1735, 0.16, 0.0844, 0.0627, 0.0456, 0.0342, 0.0323, 0.0235, 0.0246],
        [[25, 39, 41.5, 39], [0.25, 0.39, 0.415, 0.39]],
        [1.9280693458E-01, 1.9128232873E-01, 1.2305650693E-01, 1.3606233068E-01],
        [1.1435312227E-02, 1.9633220911E-01, 8.0842031232E-02, 9.0025542308E-02],
        3.0750560385E-04,
        (x, b) =>
        {
            var (top, bottom) = (x * (x + b[1]), (x * x) + (x * b[2]) + b[3]);
            var value = b[0] * top / bottom;
            return (value, [top / bottom, b[0] * x / bottom, -value * x / bottom, -value / bottom]);
        });

    public static ReferenceFit Mgh10 { get; } = new(
        "MGH10",
        [.. Enumerable.Range(0, 16).Select(i => 50.0 + (5 * i))],
        [
            34780, 28610, 23650, 19630, 16370, 13720, 11540, 9744, 8261, 7030, 6005, 5147, 4427, 3820, 3307,
            2872,
        ],
        [[2, 400000, 25000], [0.02, 4000, 250]],
        [5.6096364710E-03, 6.1813463463E+03, 3.4522363462E+02],
        [1.5687892471E-04, 2.3309021107E+01, 7.8486103508E-01],
        8.7945855171E+01,
        (x, b) =>
        {
            var power = Math.Exp(b[1] / (x + b[2]));
            return (b[0] * power,
                [power, b[0] * power / (x + b[2]), -b[0] * power * b[1] / ((x + b[2]) * (x + b[2]))]);
        });

    public static ReferenceFit Thurber { get; } = new(
        "Thurber",
        [
            -3.067, -2.981, -2.921, -2.912, -2.840, -2.797, -2.702, -2.699, -2.633, -2.481, -2.363, -2.322,
            -1.501, -1.460, -1.274, -1.212, -1.100, -1.046, -0.915, -0.714, -0.566, -0.545, -0.400, -0.309,
            -0.109, -0.103, 0.010, 0.119, 0.377, 0.790, 0.963, 1.006, 1.115, 1.572, 1.841, 2.047, 2.200,
        ],
        [
            80.574, 84.248, 87.264, 87.195, 89.076, 89.608, 89.868, 90.101, 92.405, 95.854, 100.696, 101.060,
            401.672, 390.724, 567.534, 635.316, 733.054, 759.087, 894.206, 990.785, 1090.109, 1080.914,
            1122.643, 1178.351, 1260.531, 1273.514, 1288.339, 1327.543, 1353.863, 1414.509, 1425.208,
            1421.384, 1442.962, 1464.350, 1468.705, 1447.894, 1457.628,
        ],
        [[1000, 1000, 400, 40, 0.7, 0.3, 0.03], [1300, 1500, 500, 75, 1, 0.4, 0.05]],
        [
            1.2881396800E+03, 1.4910792535E+03, 5.8323836877E+02, 7.5416644291E+01, 9.6629502864E-01,
            3.9797285797E-01, 4.9727297349E-02,
        ],
        [
            4.6647963344E+00, 3.9571156086E+01, 2.8698696102E+01, 5.5675370270E+00, 3.1333340687E-02,
            1.4984928198E-02, 6.5842344623E-03,
        ],
        5.6427082397E+03,
        (x, b) =>
        {
            var top = b[0] + (x * (b[1] + (x * (b[2] + (x * b[3])))));
            var bottom = 1 + (x * (b[4] + (x * (b[5] + (x * b[6])))));
            var value = top / bottom;
            return (value,
                [1 / bottom, x / bottom, x * x / bottom, x * x * x / bottom,
                    -value * x / bottom, -value * x * x / bottom, -value * x * x * x / bottom]);
        });
}
