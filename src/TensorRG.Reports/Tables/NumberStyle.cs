namespace TensorRG.Reports;

/// <summary>How a numeric column reads on screen. CSV and JSON always carry the full digits.</summary>
public enum NumberStyle
{
    /// <summary>Shortest digits that read back as the same number; with an error column, value with error bar.</summary>
    Plain,

    /// <summary>Two significant digits and an exponent, 1.4e-08.</summary>
    Scientific,

    /// <summary>A time in seconds as 1.2 s or 3 min 05 s.</summary>
    Duration,

    /// <summary>A count as 1024 or 2^40.</summary>
    Count,
}
